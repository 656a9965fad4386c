import type { Follow } from '@pegwell/shared/contract/live';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { momentOf } from '../../../lib/format';
import { announcement } from '../announcement';
import { LaterList } from './later-list';
import { NextSection } from './next-section';
import { NowSection } from './now-section';
import styles from './follow.module.css';

interface FollowViewProps {
  readonly follow: Follow;
  readonly kind: InstrumentKind;
}

/** The evening for one instrument: now, next, later; or that it has not begun, or is over. */
export function FollowView({ follow, kind }: FollowViewProps) {
  const { status, title, now, next, later, kinds } = follow;
  return (
    <>
      <p className="visually-hidden" role="status">
        {announcement(follow, kind)}
      </p>
      {now ? (
        <NowSection now={now} kind={kind} inRoom={kinds.includes(kind.id)} referenceA={follow.referenceA} />
      ) : (
        <section className={styles.plain}>
          <h1>{title}</h1>
          <p>
            {status === 'finished'
              ? 'Over for tonight. Good night, and safe home.'
              : `Not begun yet. ${momentOf(follow.startsAt, follow.timeZone)}. This page changes by itself.`}
          </p>
          {status === 'planned' && !next ? <p>No tune is planned yet.</p> : null}
        </section>
      )}
      <NextSection follow={follow} kind={kind} />
      <LaterList later={later} set={(next ?? now)?.set ?? ''} />
    </>
  );
}
