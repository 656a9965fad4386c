import type { Happened } from '@pegwell/shared/contract/history';
import { momentOf } from '../../../lib/format';
import { happenedWords } from '../happened-words';
import styles from './history.module.css';

interface HistoryListProps {
  readonly events: readonly Happened[];
  readonly timeZone: string;
}

/** Newest first. Names stand apart from the words around them: some are written from right to left. */
export function HistoryList({ events, timeZone }: HistoryListProps) {
  return (
    <ol className={styles.events}>
      {events.map((event) => {
        const { who, did } = happenedWords(event);
        return (
          <li key={event.id}>
            <span>
              <b>
                <bdi>{who}</bdi>
              </b>{' '}
              <bdi>{did}</bdi>
            </span>
            <time dateTime={event.at}>{momentOf(event.at, timeZone)}</time>
          </li>
        );
      })}
    </ol>
  );
}
