import type { FollowTune } from '@pegwell/shared/contract/live';
import { keyWords } from '../../../music/key-words';
import { priceOf, titleOf } from '../follow-words';
import styles from './follow.module.css';

interface LaterListProps {
  readonly later: readonly FollowTune[];
  /** The title of the set that plays before them: a new one is a break. */
  readonly set: string;
}

/** What is to come, and what each tune asks of this player. */
export function LaterList({ later, set }: LaterListProps) {
  if (later.length === 0) return null;
  return (
    <section className={styles.later} aria-label="Later">
      <ol>
        {later.map((tune, index) => {
          const before = later[index - 1]?.set ?? set;
          return (
            <li key={tune.entryId}>
              {tune.set === before ? null : <p className={styles.break}>{`Break · ${tune.set}`}</p>}
              <b>{titleOf(tune)}</b>
              <span>
                {tune.title === null ? 'open' : keyWords(tune.key, tune.mode)} ·{' '}
                <span className={tune.retune ? styles.price : undefined}>{priceOf(tune.retune)}</span>
              </span>
            </li>
          );
        })}
      </ol>
    </section>
  );
}
