import { noteOf } from '@pegwell/shared/music/pitch';
import { useEffect } from 'react';
import { Button } from '../../../ui/button';
import { canListen, type Microphone } from '../hooks/use-microphone';
import { useTuner } from '../hooks/use-tuner';
import type { TunerGoal } from '../tuner/tuner';
import { tunerWords } from '../tuner/tuner-words';
import styles from './tuner-panel.module.css';

interface TunerPanelProps {
  readonly microphone: Microphone;
  readonly goal: TunerGoal;
  /** Spelled pitches. */
  readonly from: string;
  readonly to: string;
  readonly onInTune: () => void;
}

/** Before it goes on by itself, so that the words are read. */
const GO_ON_AFTER_MS = 900;

/** Listens to the string that is tuned and says how far it has to go, once the player asks for it. */
export function TunerPanel({ microphone, goal, from, to, onInTune }: TunerPanelProps) {
  const told = useTuner(microphone, goal);
  const peg = goal.strings[goal.index]?.peg ?? '';
  const isDone = told.telling === 'done';
  useEffect(() => {
    if (!isDone) return;
    const timer = setTimeout(onInTune, GO_ON_AFTER_MS);
    return () => clearTimeout(timer);
  }, [isDone, onInTune]);

  if (!canListen()) {
    return <p className={styles.quiet}>Here the browser gives this page no microphone. Tune by the sound.</p>;
  }
  if (microphone.state !== 'on') {
    return (
      <div className={styles.ask}>
        <Button look="outline" onClick={microphone.start} aria-disabled={microphone.state === 'asking'}>
          Listen to my string
        </Button>
        <p className={styles.quiet} role="status">
          {microphone.state === 'withheld'
            ? 'No microphone was given. Tune by the sound, or allow it in the browser.'
            : 'For a quiet corner. Nothing is recorded or sent.'}
        </p>
      </div>
    );
  }
  return (
    <section className={styles.panel} aria-label="Tuner" data-telling={told.telling}>
      <p className={styles.words} aria-hidden={told.telling === 'tuning' || undefined}>
        {tunerWords(told, peg)}
      </p>
      {/* Numbers that change many times a second are no words for a voice. */}
      <p className={styles.spoken} role="status">
        {told.telling === 'tuning' ? '' : tunerWords(told, peg)}
      </p>
      <Scale {...{ goal, from, to }} toGo={told.toGo} />
      <Button look="quiet" onClick={microphone.stop}>
        Stop listening
      </Button>
    </section>
  );
}

const WIDTH = 350;
const [LEFT, RIGHT] = [40, 290];

/** Where the string is between where it was and where it is to go. */
function Scale({
  goal,
  from,
  to,
  toGo,
}: Pick<TunerPanelProps, 'goal' | 'from' | 'to'> & { toGo: number | null }) {
  const start = goal.strings[goal.index]?.hertz ?? goal.target;
  const whole = 1200 * Math.log2(goal.target / start);
  const [startX, targetX] = whole < 0 ? [RIGHT, LEFT] : [LEFT, RIGHT];
  const done = toGo === null || whole === 0 ? 0 : 1 - toGo / whole;
  const x = Math.min(WIDTH - 12, Math.max(12, startX + done * (targetX - startX)));
  return (
    <svg viewBox={`0 0 ${WIDTH} 74`} className={styles.scale} aria-hidden="true">
      <path d={`M10 52H${WIDTH - 10}`} stroke="var(--line)" strokeWidth="2" />
      <path d={`M${startX} 42v20`} stroke="var(--ink-2)" strokeWidth="2" />
      <text x={startX} y="32" textAnchor="middle" fontSize="15" fontWeight="600" fill="var(--ink-2)">
        {noteOf(from)}
      </text>
      <path d={`M${targetX} 34v32`} stroke="var(--spruce)" strokeWidth="4" />
      <text x={targetX} y="24" textAnchor="middle" fontSize="22" fontWeight="900" fill="var(--spruce)">
        {noteOf(to)}
      </text>
      {toGo === null ? null : (
        <>
          <path d={`M${startX} 52H${x}`} stroke="var(--rosin)" strokeWidth="8" strokeLinecap="round" />
          <circle cx={x} cy="52" r="12" fill="var(--rosin)" />
        </>
      )}
    </svg>
  );
}
