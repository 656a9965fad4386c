import { DEFERENCE } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { retunePlan, type RetuneStep } from '@pegwell/shared/music/retune-plan';
import { capoSentence, checkSentence } from '@pegwell/shared/music/retune-steps';
import { showTuned, type Tuned } from '@pegwell/shared/music/tuning';
import { useCallback, useEffect, useRef, useState } from 'react';
import { TuningText } from '../../../pictures/tuning-text';
import { Button } from '../../../ui/button';
import phone from '../../../ui/phone.module.css';
import { useMicrophone } from '../hooks/use-microphone';
import type { OwnStrings } from '../hooks/use-own-strings';
import { AllStrings } from './all-strings';
import { TurnOfCard } from './turn-of-card';
import styles from './retune-card.module.css';

interface RetuneCardProps {
  readonly kind: InstrumentKind;
  readonly from: Tuned;
  readonly to: Tuned;
  /** A4 of the room, in hertz. */
  readonly referenceA: number;
  readonly strings: OwnStrings;
  /** What to press when all is done; null where there is nowhere to go. */
  readonly onDone: (() => void) | null;
}

/**
 * From one tuning to another, one step at a time. Every step says one thing: a capo, one string, a look at the whole.
 */
export function RetuneCard({ kind, from, to, referenceA, strings, onDone }: RetuneCardProps) {
  const plan = retunePlan(kind, from, to, { gut: strings.gut });
  const microphone = useMicrophone();
  const [at, setAt] = useState(0);
  const heading = useRef<HTMLHeadingElement>(null);
  const moved = useRef(false);
  useEffect(() => {
    if (moved.current) heading.current?.focus({ preventScroll: true });
  }, [at]);
  const goTo = useCallback((next: number) => {
    moved.current = true;
    setAt(next);
    window.scrollTo(0, 0);
  }, []);
  const onInTune = useCallback(() => goTo(at + 1), [goTo, at]);
  const step = plan[at];
  const route = `${showTuned(kind, from)} to ${showTuned(kind, to)}`;

  return (
    <>
      <header className={phone.top}>
        <span>
          {plan.length === 0 ? route : `${route} · step ${Math.min(at + 1, plan.length)} of ${plan.length}`}
        </span>
        <span>{`A = ${referenceA}`}</span>
      </header>
      <div className={styles.dots} aria-hidden="true">
        {plan.map((_, index) => (
          <i key={index} data-at={index === at || undefined} data-done={index < at || undefined} />
        ))}
      </div>
      <main className={styles.step}>
        {step === undefined ? (
          <>
            <h1 ref={heading} tabIndex={-1}>
              {plan.length === 0 ? 'Nothing to turn' : 'There you are'}
            </h1>
            <p className={styles.where}>
              <TuningText text={showTuned(kind, to)} />
            </p>
            <p>Play every string once more: a change on one moves the others.</p>
            <AllStrings {...{ kind, to, referenceA, strings }} />
          </>
        ) : step.type === 'turn' ? (
          <TurnOfCard
            key={at}
            {...{ kind, step, referenceA, strings, heading, microphone, onInTune }}
            standing={standingBefore(from.pitches, plan.slice(0, at))}
            capo={from.capo}
          />
        ) : (
          <>
            <h1 ref={heading} tabIndex={-1}>
              {step.type === 'capo' ? capoSentence(step) : 'Look, and listen'}
            </h1>
            {step.type === 'check' ? (
              <>
                <p>{checkSentence(step)}</p>
                <AllStrings {...{ kind, to: { ...to, capo: 0 }, referenceA, strings }} />
              </>
            ) : step.to === 0 && at < plan.length - 1 ? (
              <p>Pegs are turned without a capo.</p>
            ) : null}
          </>
        )}
        {plan.some(({ type }) => type === 'turn') ? <p className={styles.limits}>{DEFERENCE}</p> : null}
      </main>
      <div className={styles.foot}>
        {step !== undefined ? (
          <Button size="large" wide onClick={() => goTo(at + 1)}>
            {at === plan.length - 1 ? 'Done' : 'Done, next'}
          </Button>
        ) : onDone ? (
          <Button size="large" wide onClick={onDone}>
            Back to the evening
          </Button>
        ) : null}
        {at > 0 ? (
          <Button look="outline" size="large" onClick={() => goTo(at - 1)}>
            Back
          </Button>
        ) : null}
      </div>
    </>
  );
}

/** How the strings stand once those steps are done. */
function standingBefore(pitches: readonly string[], done: readonly RetuneStep[]): readonly string[] {
  const standing = [...pitches];
  for (const step of done) if (step.type === 'turn') standing[step.courseIndex] = step.to;
  return standing;
}
