import type { InstrumentKind } from './instrument';
import { retune } from './retune';
import type { StepTerms } from './step-words';
import type { Tuned } from './tuning';
import { capoWords, turns } from './words';

/** A fifth string's spike stands this many frets above the capo's (F. Ford, frets.com: 7 and 9 are usual). */
const SPIKE_ABOVE_CAPO = 5;

/** Kinds whose bridge cannot move or fall. */
const GLUED_BRIDGES: readonly string[] = ['guitar', 'ukulele'];

/**
 * A whole retune as sentences in a safe order: capo off and fifth string out of its spike; the strings that
 * come down, one at a time; those that go up; a look at the bridge and at every string; capo on. Empty where
 * neither peg nor capo moves. Common practice.
 */
export function retuneSteps(
  kind: InstrumentKind,
  from: Tuned,
  to: Tuned,
  terms: StepTerms = 'steps',
): readonly string[] {
  const { pegChanges } = retune(kind, from.pitches, to.pitches);
  const spiked = kind.id === 'banjo';
  if (pegChanges === 0) {
    const capo = capoWords(from.capo, to.capo);
    if (capo === '') return [];
    return [`${sentence(capo)}${spiked ? ` ${spikeAt(to.capo)}` : ''}`];
  }
  const steps: string[] = [];
  if (from.capo > 0) steps.push(spiked ? 'Capo off, fifth string out of its spike.' : 'Capo off.');
  for (const turn of turns(kind, from.pitches, to.pitches, terms)) {
    const how = turn.direction === 'down' ? 'A little under, then up to pitch.' : 'Slowly, from below.';
    steps.push(`${turn.full}. ${how}`);
  }
  const bridge = GLUED_BRIDGES.includes(kind.id) ? 'Check' : 'See that the bridge stands upright, and check';
  steps.push(`${bridge} all strings again: one moves the others.`);
  if (to.capo > 0) steps.push(`Capo on at fret ${to.capo}.${spiked ? ` ${spikeAt(to.capo)}` : ''}`);
  return steps;
}

function sentence(words: string): string {
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;
}

function spikeAt(capo: number): string {
  return capo === 0
    ? 'Fifth string out of its spike.'
    : `Fifth string under the spike at fret ${SPIKE_ABOVE_CAPO + capo}.`;
}

/** What to keep to while turning, said once beside the steps. Common practice. */
export const TURNING_HABITS: readonly string[] = [
  'Turn one string at a time: never several slack at once, or the bridge or the soundpost can fall.',
  'Push a friction peg in a little while you turn it.',
  'Keep your face out of the line of the string.',
];
