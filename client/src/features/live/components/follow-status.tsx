import type { Heard } from '../follower';
import { VISIBLE_MS } from '../follower';
import { agoOf } from '../follow-words';
import { useClock } from '../hooks/use-clock';
import styles from './follow-status.module.css';

/** Three questions without an answer, and a little: then what is shown may be old. */
export const OLD_MS = 4 * VISIBLE_MS;

/** How fresh what is shown is: with the host, or last heard so long ago. */
export function FollowStatus({ heardAt, problem }: Pick<Heard, 'heardAt' | 'problem'>) {
  const now = useClock(1_000);
  const age = heardAt === null ? Infinity : now - heardAt;
  const old = age > OLD_MS;
  return (
    <span className={old ? styles.old : styles.fresh}>
      <i aria-hidden="true" />
      {heardAt === null
        ? problem
          ? 'No answer yet'
          : 'Asking'
        : old
          ? `Last heard ${agoOf(age)} ago`
          : 'with the host'}
      <span className="visually-hidden" role="status">
        {old && problem ? 'No signal. This is what was heard last.' : ''}
      </span>
    </span>
  );
}
