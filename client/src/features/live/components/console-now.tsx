import type { LiveAction, LiveState } from '@pegwell/shared/contract/live';
import type { Session } from '@pegwell/shared/contract/sessions';
import { useEffect, useRef } from 'react';
import { useParams } from 'react-router-dom';
import { Button, LinkButton } from '../../../ui/button';
import { count } from '../../../lib/format';
import { titleOf, underTitle } from '../follow-words';
import { useClock } from '../hooks/use-clock';
import { tuneOf } from './console-tune';
import styles from './console.module.css';

type Entry = Session['sets'][number]['entries'][number];

interface ConsoleNowProps {
  readonly state: LiveState;
  /** In playing order. */
  readonly entries: readonly Entry[];
  readonly mayRun: boolean;
  /** The step under way. */
  readonly taking: LiveAction | null;
  readonly onStep: (action: LiveAction) => Promise<void>;
}

/** The tune that is now, and the steps that can be taken from it. The likeliest stands first. */
export function ConsoleNow({ state, entries, mayRun, taking, onStep }: ConsoleNowProps) {
  const { status, phase, nowEntryId, called } = state;
  const index = entries.findIndex(({ id }) => id === nowEntryId);
  const [now, next] = [entries[index], entries[index + 1]];
  const press = (action: LiveAction) => ({
    disabled: taking !== null,
    onClick: () => void onStep(action),
  });

  const steps = useRef<HTMLDivElement>(null);
  const seen = useRef(phase);

  // A button that was pressed may be gone by now: the keyboard goes on with the likeliest step.
  useEffect(() => {
    if (seen.current === phase) return;
    seen.current = phase;
    if (document.activeElement === document.body) steps.current?.querySelector('button')?.focus();
  }, [phase]);

  if (status === 'finished') return <Finished called={called.length} />;
  if (status === 'planned') {
    return (
      <>
        <section aria-label="Now">
          <h2 className={styles.title}>Not begun yet</h2>
          <p className={styles.key}>
            {next
              ? `First comes ${titleOf(tuneOf(next))}.`
              : 'There is no tune on the board yet. Put one there first.'}
          </p>
        </section>
        {mayRun && next ? (
          <div className={styles.steps}>
            <Button size="large" {...press('start')} busy={taking === 'start' && 'Starting'}>
              Start the evening
            </Button>
          </div>
        ) : null}
      </>
    );
  }
  const tuning = phase === 'tuning';
  const first = index === 0 && (!tuning || called.length === 1);
  return (
    <>
      <section aria-label="Now">
        <p className={tuning ? styles.tuning : styles.playing}>
          {tuning ? 'Coming now · the room tunes' : 'Playing now'} <Since instant={state.stepAt} />
        </p>
        <h2 className={styles.title}>{now ? titleOf(tuneOf(now)) : 'This tune is gone from the board'}</h2>
        <p className={styles.key}>{now ? underTitle(tuneOf(now)) : ''}</p>
      </section>
      {mayRun ? (
        <div className={styles.steps} ref={steps} role="group" aria-label="Steps">
          {tuning ? (
            <Button size="large" {...press('retuned')} busy={taking === 'retuned' && 'A moment'}>
              Everyone is in tune
            </Button>
          ) : null}
          {next ? (
            <Button
              size="large"
              look={tuning ? 'outline' : 'solid'}
              className={styles.nextButton}
              {...press('next')}
              busy={taking === 'next' && 'Calling it'}
            >
              <span>Next</span> {titleOf(tuneOf(next))}
            </Button>
          ) : null}
          <Button
            size="large"
            look="outline"
            {...press('back')}
            disabled={taking !== null || first}
            busy={taking === 'back' && 'Going back'}
          >
            Back
          </Button>
        </div>
      ) : null}
    </>
  );
}

function Finished({ called }: { readonly called: number }) {
  const { circleId = '' } = useParams();
  return (
    <section aria-label="Now">
      <h2 className={styles.title}>Good night</h2>
      <p className={styles.key}>{`${count(called, 'tune')} called.`}</p>
      <p className={styles.record}>
        <LinkButton to={`/c/${circleId}/record`} size="large">
          See the record
        </LinkButton>
      </p>
    </section>
  );
}

/** Minutes since the last step. */
function Since({ instant }: { readonly instant: string | null }) {
  const now = useClock(5_000);
  const minutes = instant === null ? 0 : Math.floor((now - Date.parse(instant)) / 60_000);
  return minutes < 1 ? null : <span className={styles.since}>{`for ${count(minutes, 'minute')}`}</span>;
}
