import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { noteOf } from '@pegwell/shared/music/pitch';
import { turnWords, turns } from '@pegwell/shared/music/words';
import { TurnMark } from './turn-mark';
import styles from './peg-strip.module.css';

interface PegStripProps {
  readonly kind: InstrumentKind;
  /** Spelled pitches in string order, without the capo. Null while the kind is free: nothing turns. */
  readonly from: readonly string[] | null;
  readonly to: readonly string[] | null;
  /** `small` between two cards, `large` on a music stand. */
  readonly size?: 'small' | 'large';
  /** What to draw where no peg turns: a thin line, or the pegs at rest. */
  readonly whenStill?: 'line' | 'pegs';
  /** True where the turns stand beside it in words; a screen reader then passes over the picture. */
  readonly wordsBeside?: boolean;
}

/**
 * As many peg heads as the instrument has, in string order, each under the standing name of its string.
 * Those that turn are filled and carry which way and the note they end on. Needs no Chakra: the phone
 * shows the same strip.
 */
export function PegStrip(props: PegStripProps) {
  const { kind, from, to, size = 'small', whenStill = 'line', wordsBeside = false } = props;
  const turning = from && to ? turns(kind, from, to) : [];
  const label = turning.length ? turning.map((turn) => turn.spoken).join('; ') : 'Nothing to turn';
  const voice = wordsBeside ? { 'aria-hidden': true as const } : { role: 'img', 'aria-label': label };
  if (turning.length === 0 && whenStill === 'line') return <div className={styles.line} {...voice} />;

  return (
    <div className={`${styles.strip} ${styles[size]}`} {...voice}>
      {kind.courses.map((course, index) => {
        const [was, is] = [from?.[index], to?.[index]];
        const turn = was && is ? turnWords(kind, index, was, is) : null;
        const turned = turn !== null && turn.semitones !== 0;
        return (
          <div
            key={course.ordinal}
            className={`${styles.course} ${turned ? styles.turned : ''} ${course.pegs > 1 ? styles.doubled : ''}`}
            data-turned={turned ? turn.direction : undefined}
          >
            <span className={styles.name}>{course.name}</span>
            <span className={styles.pegs}>
              {Array.from({ length: course.pegs }, (_, peg) => (
                <Peg key={peg} turned={turned} size={size} />
              ))}
            </span>
            <span className={styles.target}>
              {turned && is ? (
                <>
                  <TurnMark up={turn.direction === 'up'} size={size === 'large' ? 14 : 10} />
                  {noteOf(is)}
                </>
              ) : null}
            </span>
            {size === 'large' ? <span className={styles.number}>{turned ? turn.number : ''}</span> : null}
          </div>
        );
      })}
    </div>
  );
}

/** A peg from the front: pip, head, collar, a short shank. Filled with rosin where it turns. */
function Peg({ turned, size }: { readonly turned: boolean; readonly size: 'small' | 'large' }) {
  // Hair lines of one px at rest and a stronger edge when it turns, in px whatever the size.
  const width = size === 'large' ? 37 : 18;
  const px = 24 / width;
  const edge = turned ? 'var(--rosin-ink)' : 'var(--ink-2)';
  return (
    <svg
      width={width}
      height={(width * 31) / 24}
      viewBox="0 0 24 31"
      fill={turned ? 'var(--rosin)' : 'none'}
      stroke={edge}
      strokeWidth={(turned ? 1.5 : 1.1) * px}
      strokeLinejoin="round"
    >
      <circle cx="12" cy="2" r="1.4" fill={edge} stroke="none" />
      <path d="M9.3 17.500C.5 16.7-.8 3.3 12 3.8 24.8 3.3 23.5 16.7 14.7 17.500Z" />
      <path d="M7.5 19h9" strokeWidth={(turned ? 2.4 : 1.8) * px} strokeLinecap="round" />
      <path d="M9.1 21 10.6 29.500h2.800L14.9 21Z" />
    </svg>
  );
}
