import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { headOf, mirrored, placeWords, wayWords } from '@pegwell/shared/music/peg-places';
import { midiOf, noteOf } from '@pegwell/shared/music/pitch';
import type { TurnStep } from '@pegwell/shared/music/retune-plan';
import { tensionWords } from '@pegwell/shared/music/tension';
import { stepWords } from '@pegwell/shared/music/step-words';
import { pegNameInFull, turnWords } from '@pegwell/shared/music/words';
import { useState, type Ref } from 'react';
import { HeadPicture } from '../../../pictures/head-picture';
import { Button } from '../../../ui/button';
import { frequencyOfString } from '../frequency';
import type { OwnStrings } from '../hooks/use-own-strings';
import type { Microphone } from '../hooks/use-microphone';
import { HearButtons } from './hear-buttons';
import { TunerPanel } from './tuner-panel';
import styles from './retune-card.module.css';

/** So far over the higher of both ends a string is in danger: a half step. */
const DANGER_CENTS = 100;

interface TurnOfCardProps {
  readonly kind: InstrumentKind;
  readonly step: TurnStep;
  readonly referenceA: number;
  readonly strings: OwnStrings;
  readonly heading: Ref<HTMLHeadingElement>;
  /** How all strings stand before this step, spelled. */
  readonly standing: readonly string[];
  /** The capo that came off before the pegs were turned; 0 for none. */
  readonly capo: number;
  readonly microphone: Microphone;
  readonly onInTune: () => void;
}

/** One string: which peg, where it stands, which way, how far, and what to look out for. */
export function TurnOfCard(props: TurnOfCardProps) {
  const { kind, step, referenceA, strings, heading, standing, capo, microphone, onInTune } = props;
  const [goesOn, setGoesOn] = useState(false);
  const { courseIndex, from, to, direction, caution } = step;
  const pegs = kind.courses[courseIndex]?.pegs ?? 1;
  const built = headOf(kind);
  const head = built && strings.leftHanded ? mirrored(built) : built;
  const semitones = midiOf(to) - midiOf(from);
  const title = `${pegNameInFull(kind, courseIndex)}: ${direction} ${stepWords(semitones)}`;

  // What the limits refuse is for the player at the peg to decide, knowingly; nobody does it for another.
  if (caution?.grade === 'refused' && !goesOn) {
    return (
      <>
        <h1 ref={heading} tabIndex={-1}>
          {title}
        </h1>
        <p className={styles.caution} data-grade="refused">
          {caution.sentence}
        </p>
        <Button look="danger" onClick={() => setGoesOn(true)}>
          I know this string. Show the turn
        </Button>
      </>
    );
  }
  return (
    <>
      {head ? (
        <div className={styles.picture}>
          <HeadPicture kind={kind} head={head} lit={courseIndex} direction={direction} />
        </div>
      ) : null}
      <h1 ref={heading} tabIndex={-1}>
        {title}
      </h1>
      <p className={styles.how}>
        {`From ${noteOf(from)} to ${noteOf(to)}. `}
        {head ? `${placeWords(head, courseIndex, pegs)}. ${wayWords(head, direction)}. ` : null}
        {head?.friction ? 'Push it in a little as you turn. ' : null}
        {pegs > 1 ? 'One peg, then its neighbour. ' : null}
        {direction === 'down' ? 'A little under, then up to pitch.' : caution ? null : 'Slowly, from below.'}
      </p>
      {caution ? (
        <p className={styles.caution} data-grade={caution.grade}>
          {caution.sentence}
        </p>
      ) : null}
      <TunerPanel
        {...{ microphone, from, to, onInTune }}
        goal={{
          strings: standing.map((pitch, index) => ({
            peg: pegNameInFull(kind, index),
            hertz: frequencyOfString(midiOf(pitch), referenceA, strings),
          })),
          index: courseIndex,
          target: frequencyOfString(midiOf(to), referenceA, strings),
          capo,
          danger: DANGER_CENTS,
        }}
      />
      <HearButtons note={noteOf(to)} frequency={frequencyOfString(midiOf(to), referenceA, strings)} />
      <details className={styles.more}>
        <summary>In numbers</summary>
        <Numbers {...{ step, referenceA, strings }} words={turnWords(kind, courseIndex, from, to).number} />
      </details>
    </>
  );
}

interface NumbersProps extends Pick<TurnOfCardProps, 'step' | 'referenceA' | 'strings'> {
  /** `+2` */
  readonly words: string;
}

function Numbers({ step, referenceA, strings, words }: NumbersProps) {
  const semitones = midiOf(step.to) - midiOf(step.from);
  const hertz = (pitch: string) => `${frequencyOfString(midiOf(pitch), referenceA, strings).toFixed(1)} Hz`;
  return (
    <dl className={styles.numbers}>
      <dt>Half steps</dt>
      <dd>{words}</dd>
      <dt>Cents</dt>
      <dd>{`${semitones < 0 ? '−' : '+'}${Math.abs(semitones) * 100}`}</dd>
      <dt>{`${step.from} to ${step.to}`}</dt>
      <dd>{`${hertz(step.from)} to ${hertz(step.to)}`}</dd>
      <dt>Pull of the string</dt>
      <dd>{tensionWords(semitones)}</dd>
    </dl>
  );
}
