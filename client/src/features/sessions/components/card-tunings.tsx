import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { showTuned } from '@pegwell/shared/music/tuning';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import { TuningText } from '../../../pictures/tuning-text';
import { moveOfKind } from '../../../pictures/changing-kinds';
import styles from './tune-card.module.css';

interface CardTuningsProps {
  readonly entry: ShownEntry;
  readonly place: Place | undefined;
  /** The kinds that retune this evening. */
  readonly chairs: readonly Chair[];
}

/** What each kind plays here: the choice that the score made, lighter where it is assumed or merely kept. */
export function CardTunings({ entry, place, chairs }: CardTuningsProps) {
  return (
    <ul className={styles.tunings}>
      {chairs.map(({ kind }) => {
        const move = moveOfKind(place, kind.id);
        const asked = entry.tunings.find((row) => row.kind === kind.id);
        const sitsOut = entry.sitOut.includes(kind.id);
        const stands = sitsOut || !asked || asked.accepted.every(({ pitches }) => pitches === null);
        const tuned = move?.to ? showTuned(kind, move.to) : null;
        if (!tuned) return null;
        const how = sitsOut
          ? 'sits out'
          : stands
            ? 'as it stands'
            : asked.assumed
              ? 'assumed'
              : move && move.choice > 0
                ? 'not the first choice'
                : null;
        return (
          <li key={kind.id} className={stands || asked.assumed ? styles.assumed : undefined}>
            {chairs.length > 1 ? <span className={styles.kind}>{kind.name} </span> : null}
            <TuningText text={tuned} />
            {how ? (
              <span className={how === 'assumed' || how === 'as it stands' ? 'visually-hidden' : styles.how}>
                {' '}
                {how}
              </span>
            ) : null}
          </li>
        );
      })}
    </ul>
  );
}
