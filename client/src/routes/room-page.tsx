import { useParams } from 'react-router-dom';
import { FollowCode } from '../features/live/components/follow-code';
import { spaced } from '../features/live/components/follow-foot';
import { FollowStatus } from '../features/live/components/follow-status';
import { RoomView } from '../features/live/components/room-view';
import styles from '../features/live/components/room.module.css';
import { titleOf } from '../features/live/follow-words';
import { useFollow } from '../features/live/hooks/use-follow';
import { useWakeLock } from '../features/live/hooks/use-wake-lock';
import { normalCode } from '../features/live/kept-answers';
import { useLight } from '../theme/light';
import { Button } from '../ui/button';
import { Loading } from '../ui/states';

/** One screen on the wall for everybody: many sessions frown on phones. */
export function RoomPage() {
  const code = normalCode(useParams()['code'] ?? '');
  const [light, onLight] = useLight('phone');
  const { follows, heardAt, problem } = useFollow(code, 'room');
  useWakeLock();
  const [first] = follows;
  const gone = problem?.status === 404;
  const place = first?.now ?? first?.next;

  return (
    <div className={styles.page}>
      <title>{`${first?.now ? titleOf(first.now) : (first?.title ?? 'The room')} · Pegwell`}</title>
      <header className={styles.top}>
        <span>{place && first ? `Tune ${place.position} of ${first.total} · ${place.set}` : 'Pegwell'}</span>
        {first ? <span>{`A = ${first.referenceA} Hz`}</span> : null}
        {gone ? null : <FollowStatus heardAt={heardAt} problem={problem} />}
        <Button look="quiet" onClick={() => onLight(light === 'lamp' ? 'day' : 'lamp')}>
          {light === 'lamp' ? 'Day light' : 'Lamp light'}
        </Button>
      </header>
      <main className={styles.main}>
        {gone || (problem && !first) ? (
          <section className={styles.now} role="alert">
            <h1>{gone ? 'No such evening' : 'No answer yet'}</h1>
            <p className={styles.key}>
              {gone ? problem.detail : `${problem.detail} This page keeps asking.`}
            </p>
          </section>
        ) : first ? (
          <RoomView follows={follows} aside={<Follow url={first.followUrl} code={code} />} />
        ) : (
          <Loading what="the evening" />
        )}
      </main>
    </div>
  );
}

function Follow({ url, code }: { readonly url: string; readonly code: string }) {
  return (
    <aside className={styles.follow} aria-label="On your own phone">
      <FollowCode url={url} />
      <p>
        On your own phone: scan, or go to {url.replace(/^https?:\/\//, '').replace(/\/[^/]+$/, '')} and type
        <b>{spaced(code)}</b>
      </p>
    </aside>
  );
}
