import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { midiOf } from '@pegwell/shared/music/pitch';
import { TurnMark } from '../../../pictures/turn-mark';
import { spokenTuning } from '../../../pictures/tuning-text';
import { stringLetters } from '../follow-words';
import styles from './string-letters.module.css';

interface StringLettersProps {
  readonly kind: InstrumentKind;
  /** What the instrument has, spelled, in string order. */
  readonly pitches: readonly string[];
  readonly capo: number;
  /** What it had before: strings that are still to be turned are marked. */
  readonly before?: readonly string[] | null;
}

/** The tuning, a letter over each string, to be read at arm's length from a music stand. */
export function StringLetters({ kind, pitches, capo, before }: StringLettersProps) {
  const letters = stringLetters(kind, pitches);
  const spoken = spokenTuning(letters.join('') + (capo > 0 ? ` capo ${capo}` : ''));
  return (
    <div>
      <div
        className={styles.strings}
        data-many={letters.length > 5 || undefined}
        role="img"
        aria-label={`${kind.name} in ${spoken}`}
      >
        {letters.map((letter, index) => {
          const [was, is] = [before?.[index], pitches[index]];
          const delta = was && is ? midiOf(is) - midiOf(was) : 0;
          const course = kind.courses[index];
          return (
            <div key={course?.ordinal} className={delta === 0 ? undefined : styles.turned}>
              <span className={styles.mark}>
                {delta === 0 ? null : <TurnMark up={delta > 0} size={13} />}
              </span>
              <b>{letter}</b>
              <span className={styles.courses}>
                {Array.from({ length: course?.pegs ?? 1 }, (_, string) => (
                  <i key={string} style={{ borderLeftWidth: thickness(kind, index) }} />
                ))}
              </span>
            </div>
          );
        })}
      </div>
      {capo > 0 ? <p className={styles.capo}>capo {capo}</p> : null}
    </div>
  );
}

/** Strings are drawn by their standard pitch, 5 px for the lowest to 2 px for the highest, in halves. */
function thickness(kind: InstrumentKind, index: number): number {
  const heights = kind.courses.map(({ standard }) => midiOf(standard));
  const [low, high] = [Math.min(...heights), Math.max(...heights)];
  const share = ((heights[index] ?? low) - low) / Math.max(1, high - low);
  return Math.round((5 - 3 * share) * 2) / 2;
}
