import type { Chair, Place } from '@pegwell/shared/session/evening';
import { ASSUMED_BREAK_MINUTES } from '@pegwell/shared/session/minutes';
import { moves } from '../../../pictures/changing-kinds';
import { Retune } from './retune';
import styles from './off-clock.module.css';

interface OffClockProps {
  /** The place before the set that follows; undefined while it has no tunes. */
  readonly place: Place | undefined;
  readonly chairs: readonly Chair[];
}

const turns = (place: Place | undefined): place is Place => Boolean(place?.kinds.some(moves));

/** Before the first tune: what is turned on arriving costs no time of the evening. */
export function BeforeFirst({ place, chairs }: OffClockProps) {
  if (!turns(place)) return null;
  return (
    <div className={styles.opening}>
      <h2 className={styles.label}>Before the first tune · off the clock</h2>
      <Retune place={place} chairs={chairs} />
    </div>
  );
}

/** Between two sets. */
export function Break({ place, chairs }: OffClockProps) {
  return (
    <div className={styles.break}>
      <p className={styles.label}>
        Break · about {ASSUMED_BREAK_MINUTES} min{turns(place) ? ' · off the clock:' : ''}
      </p>
      {turns(place) ? <Retune place={place} chairs={chairs} /> : null}
    </div>
  );
}
