import type { Follow, FollowTune } from '@pegwell/shared/contract/live';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { keyWords } from '../../../music/key-words';
import { retuneLabel, titleOf, untilRetune } from '../follow-words';
import { Turns } from './turns';
import styles from './follow.module.css';

interface NextSectionProps {
  readonly follow: Follow;
  readonly kind: InstrumentKind;
}

/** What comes next, and what changes next, peg by peg, however many tunes away it is. */
export function NextSection({ follow, kind }: NextSectionProps) {
  const { now, next, later, retuneIn } = follow;
  if (!next) return now ? <p className={styles.last}>The last tune of the evening.</p> : null;
  const change = [next, ...later].find(({ retune }) => retune !== null);
  const first = now === null;
  return (
    <section className={styles.next} aria-label={first ? 'First' : 'Next'}>
      <p className={next.retune ? styles.turnLabel : styles.stayLabel}>
        {`${first ? 'First tune' : 'Next'} · ${next.retune ? retuneLabel(next.retune) : 'stay as you are'}`}
      </p>
      <h2>{named(next)}</h2>
      {next.retune ? <Turns kind={kind} move={next.retune} when="soon" /> : null}
      {next.retune || first ? null : (
        <p className={styles.until}>{untilRetune(retuneIn, now.phase === 'tuning' && now.retune !== null)}</p>
      )}
      {!next.retune && change?.retune ? (
        <div className={styles.change}>
          <p className={styles.turnLabel}>{`Then ${retuneLabel(change.retune)}`}</p>
          <h3>{`for ${named(change)}`}</h3>
          <Turns kind={kind} move={change.retune} when="soon" />
        </div>
      ) : null}
    </section>
  );
}

/** `Cluck Old Hen, A modal`; an open place has its key in its name already. */
export const named = (tune: FollowTune): string =>
  tune.title === null ? titleOf(tune) : `${tune.title}, ${keyWords(tune.key, tune.mode)}`;
