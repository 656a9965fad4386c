import type { InstrumentKind } from './instrument';
import { retunePlan, type CapoStep, type CheckStep } from './retune-plan';
import type { StepTerms } from './step-words';
import type { Tuned } from './tuning';
import { capoWords, turnWords } from './words';

/** The steps of a retune (see `retunePlan`), a sentence or two for each. */
export function retuneSteps(
  kind: InstrumentKind,
  from: Tuned,
  to: Tuned,
  terms: StepTerms = 'steps',
): readonly string[] {
  return retunePlan(kind, from, to).map((step) => {
    if (step.type === 'capo') return capoSentence(step);
    if (step.type === 'check') return checkSentence(step);
    const { full, direction } = turnWords(kind, step.courseIndex, step.from, step.to, terms);
    return `${full}. ${direction === 'down' ? 'A little under, then up to pitch.' : 'Slowly, from below.'}`;
  });
}

export function capoSentence({ from, to, spike }: CapoStep): string {
  const words = capoWords(from, to);
  const capo = `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;
  if (spike === null) return capo;
  return `${capo} Fifth string ${spike === 0 ? 'out of its spike' : `under the spike at fret ${spike}`}.`;
}

export function checkSentence({ bridge }: CheckStep): string {
  const look = bridge ? 'See that the bridge stands upright, and check' : 'Check';
  return `${look} all strings again: one moves the others.`;
}

/** What to keep to while turning, said once beside the steps. Common practice. */
export const TURNING_HABITS: readonly string[] = [
  'Turn one string at a time: never several slack at once, or the bridge or the soundpost can fall.',
  'Push a friction peg in a little while you turn it.',
  'Keep your face out of the line of the string.',
];
