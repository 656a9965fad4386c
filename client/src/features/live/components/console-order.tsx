import type { LiveState } from '@pegwell/shared/contract/live';
import type { Session } from '@pegwell/shared/contract/sessions';
import { keyWords } from '../../../music/key-words';
import { Button } from '../../../ui/button';
import { titleOf } from '../follow-words';
import { tuneOf } from './console-tune';
import styles from './console-order.module.css';

interface ConsoleOrderProps {
  readonly session: Session;
  readonly state: LiveState;
  readonly mayRun: boolean;
  readonly onGo: (entryId: string) => void;
}

/** The whole order, with what was called and what is now; from here any tune can be gone to. */
export function ConsoleOrder({ session, state, mayRun, onGo }: ConsoleOrderProps) {
  const entries = session.sets.flatMap((set) => set.entries);
  const goes = mayRun && state.status === 'live';
  return (
    <section aria-label="The order" className={styles.order}>
      {session.sets.map((set) => (
        <div key={set.id}>
          <h3>{set.title}</h3>
          <ol>
            {set.entries.map((entry) => {
              const now = entry.id === state.nowEntryId;
              const called = state.called.includes(entry.id);
              const title = titleOf(tuneOf(entry));
              return (
                <li
                  key={entry.id}
                  className={now ? styles.now : called ? styles.called : undefined}
                  aria-current={now ? 'step' : undefined}
                >
                  <span className={styles.number}>
                    {entries.indexOf(entry) + 1}
                    {called && !now ? <Tick /> : null}
                  </span>
                  <span className={styles.title}>
                    {title}
                    {called && !now ? <span className="visually-hidden">, called</span> : null}
                  </span>
                  <span className={styles.key}>
                    {entry.title === null ? 'open' : keyWords(entry.key, entry.mode)}
                  </span>
                  {now ? (
                    <span className={styles.here}>now</span>
                  ) : goes ? (
                    <Button look="plain" aria-label={`Go to ${title}`} onClick={() => onGo(entry.id)}>
                      Go to
                    </Button>
                  ) : null}
                </li>
              );
            })}
          </ol>
        </div>
      ))}
    </section>
  );
}

/** Drawn: the shipped typeface has none. */
function Tick() {
  return (
    <svg
      width="11"
      height="11"
      viewBox="0 0 12 12"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.8"
      aria-hidden="true"
    >
      <path d="M1.5 6.5 4.7 9.7 10.5 2.5" />
    </svg>
  );
}
