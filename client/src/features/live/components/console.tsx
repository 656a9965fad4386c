import type { LiveAction } from '@pegwell/shared/contract/live';
import type { Session } from '@pegwell/shared/contract/sessions';
import { sentenceOf } from '../../../lib/problem';
import { LinkButton } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { Failing, Loading } from '../../../ui/states';
import { useSay } from '../../../ui/status';
import { useFollow } from '../hooks/use-follow';
import { useLive } from '../hooks/use-live';
import { useWakeLock } from '../hooks/use-wake-lock';
import { titleOf } from '../follow-words';
import { ConsoleFinish } from './console-finish';
import { ConsoleKinds } from './console-kinds';
import { ConsoleNow } from './console-now';
import { ConsoleOrder } from './console-order';
import { ConsolePlayers } from './console-players';
import { tuneOf } from './console-tune';
import styles from './console.module.css';

interface ConsoleProps {
  readonly session: Session;
  /** Called when the evening has moved on. */
  readonly onStep: () => void;
}

/** From here a host runs the evening; others with an account see where it stands. */
export function Console({ session, onStep }: ConsoleProps) {
  const live = useLive(session.id);
  const follow = useFollow(session.code, 'room');
  const say = useSay();
  useWakeLock();
  const entries = session.sets.flatMap((set) => set.entries);

  if (!live.state) {
    return live.error ? (
      <Failing title="The evening does not answer" error={live.error} onRetry={live.askAgain} />
    ) : (
      <Loading what="the evening" />
    );
  }
  const { state } = live;
  const mayRun = session.can.includes('live.run') && state.status !== 'finished';

  const take = async (action: LiveAction, entryId?: string) => {
    try {
      const after = await live.step(action, entryId);
      const now = entries.find(({ id }) => id === after.nowEntryId);
      // Said for those who do not see the page change.
      if (after.status === 'finished') say('The evening is finished.');
      else if (now && after.phase === 'tuning') say(`Coming: ${titleOf(tuneOf(now))}. The room tunes.`);
    } catch (error) {
      say(sentenceOf(error));
    }
    follow.askNow();
    onStep();
  };

  return (
    <>
      <PageHeading title={session.title} about={aboutOf(session, state.nowEntryId, state.status)}>
        <LinkButton to={`/c/${session.circleId}/evenings/${session.id}`} look="plain">
          The board
        </LinkButton>
        {state.status === 'finished' ? null : (
          <LinkButton to={`/f/${session.code}/room`} look="plain" target="_blank">
            Screen for the room
          </LinkButton>
        )}
        {mayRun && state.status === 'live' ? (
          <ConsoleFinish
            left={entries.length - state.called.length}
            taking={live.taking}
            onFinish={() => take('finish')}
          />
        ) : null}
      </PageHeading>
      <div className={styles.console}>
        <div className={styles.main}>
          <ConsoleNow {...{ state, entries, mayRun }} taking={live.taking} onStep={take} />
          {state.status === 'finished' ? null : (
            <>
              <ConsoleKinds follows={follow.follows} chairs={session.chairs} phase={state.phase} />
              <ConsolePlayers url={state.followUrl} code={session.code} />
            </>
          )}
        </div>
        <div className={styles.side}>
          <ConsoleOrder
            session={session}
            state={state}
            mayRun={mayRun}
            onGo={(id) => void take('goto', id)}
          />
        </div>
      </div>
    </>
  );
}

function aboutOf(session: Session, nowEntryId: string | null, status: Session['status']): string {
  const entries = session.sets.flatMap((set) => set.entries);
  if (status === 'planned') return `Not begun. ${entries.length} tunes on the board.`;
  if (status === 'finished') return 'Finished.';
  const set = session.sets.find((one) => one.entries.some(({ id }) => id === nowEntryId));
  const number = entries.findIndex(({ id }) => id === nowEntryId) + 1;
  return `Live · tune ${number} of ${entries.length} · ${set?.title ?? ''}`;
}
