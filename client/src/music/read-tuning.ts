import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { namedTuning } from '@pegwell/shared/music/tuning-names';
import { parseTuning, type Tuned } from '@pegwell/shared/music/tuning';

/** What a tuning field makes of a text: pegs to show, words for them, or why it cannot be read. */
export interface TuningReading {
  readonly tuned: Tuned | null;
  /** "A3 E4 A4 E5, cross A", or the sentence that refuses it; empty for an empty text. */
  readonly words: string;
}

export const isAny = (text: string): boolean => /^any$/i.test(text.trim());

interface ReadOptions {
  /** Whether "as it stands" may be said here. */
  readonly any?: boolean;
  /** A capo chosen beside the text, 0 for none. */
  readonly capo?: number;
}

export function readTuning(
  kind: InstrumentKind,
  text: string,
  { any = false, capo: beside = 0 }: ReadOptions = {},
): TuningReading {
  if (text.trim() === '') return { tuned: null, words: '' };
  if (any && isAny(text)) return { tuned: null, words: 'As it stands: nobody turns a peg for it.' };
  const parsed = parseTuning(kind, text, beside);
  if (!parsed.ok) return { tuned: null, words: parsed.reason };
  const { pitches, capo } = parsed.value;
  const name = namedTuning(kind, pitches)?.names[0];
  const parts = [pitches.join(' '), ...(capo > 0 ? [`capo ${capo}`] : []), ...(name ? [name] : [])];
  return { tuned: parsed.value, words: parts.join(', ') };
}
