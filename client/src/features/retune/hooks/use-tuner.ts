import { useEffect, useRef, useState } from 'react';
import { Ear } from '../tuner/ear';
import { hear, rangesOf, START, type TunerGoal, type TunerState } from '../tuner/tuner';
import type { Microphone } from './use-microphone';

/** Follows one string through the microphone; starts afresh with every goal's mount. */
export function useTuner({ state, listen }: Microphone, goal: TunerGoal): TunerState {
  const [told, setTold] = useState(START);
  const latest = useRef(goal);
  useEffect(() => {
    latest.current = goal;
  }, [goal]);
  useEffect(() => {
    if (state !== 'on') return;
    let ear: Ear | null = null;
    return listen((frame, at, rate) => {
      ear ??= new Ear(rate);
      const its = latest.current;
      const found = ear.hear(frame, rangesOf(its));
      const reading = { at, hertz: found?.hertz ?? null, level: levelOf(frame) };
      setTold((before) => hear(before, reading, its));
    });
  }, [state, listen]);
  return told;
}

/** Root mean square of the newest quarter, in decibels below full scale. */
function levelOf(frame: Float32Array): number {
  const newest = frame.subarray((frame.length * 3) / 4);
  const power = newest.reduce((sum, value) => sum + value * value, 0) / newest.length;
  return 10 * Math.log10(power + 1e-12);
}
