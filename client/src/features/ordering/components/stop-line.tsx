import type { ExplainedPlace } from '@pegwell/shared/session/explain';
import { count } from '../../../lib/format';
import styles from './stop-line.module.css';

/** Told without being asked, where no peg turns: what a host may want to mend. */
const TOLD = ['ruleBreaks', 'secondChoices', 'capoMoves'];

interface StopLineProps {
  readonly why: ExplainedPlace;
}

/** What is turned before a tune, with its price; opened, why it counts as it does. */
export function StopLine({ why: { offClock, pegChanges, reasons } }: StopLineProps) {
  if (pegChanges === 0) {
    const told = reasons.filter(({ level }) => TOLD.includes(level));
    return told.length === 0 ? null : (
      <ul className={styles.notes} data-between>
        {told.map(({ words }) => (
          <li key={words}>{words}</li>
        ))}
      </ul>
    );
  }
  const pegs = reasons.filter(({ level }) => level === 'pegChanges');
  const others = reasons.filter(({ level }) => level !== 'pegChanges');
  return (
    <details className={styles.stop} data-between>
      <summary>
        <span className={offClock ? styles.off : styles.price}>
          {pegChanges}
          <span className="visually-hidden">
            {` ${count(pegChanges, 'peg').replace(/^\d+ /, '')}${offClock ? ', off the clock' : ''}: `}
          </span>
        </span>
        <span>
          {pegs.map(({ words }) => (
            <span key={words} className={styles.turns}>
              {words}
            </span>
          ))}
        </span>
      </summary>
      <ul>
        {others.map(({ words }) => (
          <li key={words}>{words}</li>
        ))}
      </ul>
    </details>
  );
}
