import { useState } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import { CodeForm } from '../features/live/components/code-form';
import { FollowFoot } from '../features/live/components/follow-foot';
import { FollowStatus } from '../features/live/components/follow-status';
import { FollowView } from '../features/live/components/follow-view';
import { InstrumentChoice } from '../features/live/components/instrument-choice';
import styles from '../features/live/components/follow.module.css';
import { titleOf } from '../features/live/follow-words';
import { useFollow } from '../features/live/hooks/use-follow';
import { useInstrument } from '../features/live/hooks/use-instrument';
import { useWakeLock } from '../features/live/hooks/use-wake-lock';
import { normalCode } from '../features/live/kept-answers';
import { useLight } from '../theme/light';
import { Loading } from '../ui/states';
import phone from '../ui/phone.module.css';

/** The phone on the music stand. Anyone with the code, no account. */
export function FollowPage() {
  const code = normalCode(useParams()['code'] ?? '');
  const [kind, choose] = useInstrument();
  const [changing, setChanging] = useState(false);
  const [light, onLight] = useLight('phone');
  const { follows, heardAt, problem } = useFollow(code, [kind?.id ?? 'fiddle']);
  useWakeLock();
  const [follow] = follows;
  const gone = problem?.status === 404;
  const place = follow?.now ?? follow?.next;

  return (
    <div className={phone.page}>
      <title>{`${follow?.now ? titleOf(follow.now) : (follow?.title ?? 'Follow the evening')} · Pegwell`}</title>
      <header className={phone.top}>
        <span>
          {place && follow ? `Tune ${place.position} of ${follow.total} · ${place.set}` : 'Pegwell'}
        </span>
        {gone ? null : <FollowStatus heardAt={heardAt} problem={problem} />}
      </header>
      <main>
        {gone ? (
          <UnknownCode code={code} sentence={problem.detail} />
        ) : !kind || changing ? (
          <InstrumentChoice
            inRoom={follow?.kinds ?? []}
            chosen={kind}
            onChoose={(next) => {
              choose(next);
              setChanging(false);
            }}
          />
        ) : follow?.kind === kind.id ? (
          <FollowView follow={follow} kind={kind} />
        ) : problem ? (
          <section className={styles.plain} role="alert">
            <h1>No answer yet</h1>
            <p>{problem.detail}</p>
            <p>This page keeps asking.</p>
          </section>
        ) : (
          <Loading what="the evening" />
        )}
      </main>
      <FollowFoot
        {...{ light, onLight }}
        code={gone ? null : code}
        kind={gone || changing ? null : kind}
        referenceA={follow?.referenceA ?? null}
        onInstrument={() => {
          setChanging(true);
          window.scrollTo(0, 0);
        }}
      />
    </div>
  );
}

function UnknownCode({ code, sentence }: { readonly code: string; readonly sentence: string }) {
  const navigate = useNavigate();
  return (
    <section className={styles.plain}>
      <h1>No such evening</h1>
      <p role="alert">{sentence}</p>
      <CodeForm key={code} start={code} onCode={(next) => void navigate(`/f/${next}`, { replace: true })} />
    </section>
  );
}
