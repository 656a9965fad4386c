import { useEffect, useState } from 'react';
import { count } from '../../../lib/format';
import type { BoardState } from '../hooks/board-state';
import styles from './save-state.module.css';

type SaveStateProps = Pick<BoardState, 'saving' | 'waiting' | 'takenIn'>;

/** Milliseconds for which it is said whose changes came in. */
const STAYS = 8_000;

/** Says quietly how the board stands: saved, saving, kept here, or what came in. */
export function SaveState({ saving, waiting, takenIn }: SaveStateProps) {
  const [past, setPast] = useState<number | null>(null);
  const version = takenIn?.version ?? null;
  useEffect(() => {
    if (version === null) return undefined;
    const timer = setTimeout(() => setPast(version), STAYS);
    return () => clearTimeout(timer);
  }, [version]);

  const kept = `${count(waiting, 'change')} kept here`;
  const news = takenIn && takenIn.version !== past ? `Taken in: ${takenIn.who}’s changes` : '';
  const words = {
    saved: 'Saved',
    waiting: 'Saving',
    saving: 'Saving',
    offline: `Offline: ${kept}`,
    refused: `Not saved: ${kept}`,
  }[saving];
  const away = saving === 'offline' || saving === 'refused';
  return (
    <p className={styles.state}>
      {/* Every "Saved" read aloud would only disturb; what keeps from saving, and what came in, is told. */}
      <span className={away ? styles.away : undefined} role={away ? 'status' : undefined}>
        {words}
      </span>
      <span role="status">{news}</span>
    </p>
  );
}
