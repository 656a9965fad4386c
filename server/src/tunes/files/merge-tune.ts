import { updateTuneSchema } from '@pegwell/shared/contract/tunes';
import { parseTonic } from '@pegwell/shared/music/pitch';
import { titleKey } from '@pegwell/shared/tunes/title-key';
import type { TuneContent } from '../tune-content';
import type { FileTune } from './file-tune';

/**
 * A tune with what a likely duplicate adds. What it says stays; empty fields are filled, tunings where the key is
 * the same; another title or key and other notes go into the notes, so that nothing is lost.
 */
export function mergeTune<Known extends TuneContent>(known: Known, { words, stated }: FileTune): Known {
  const isSameKey =
    (words.key === undefined || pitchClass(words.key) === pitchClass(known.key)) &&
    (words.mode === undefined || words.mode === known.mode);
  return {
    ...known,
    rhythm: known.rhythm ?? words.rhythm ?? null,
    parts: known.parts ?? words.parts ?? null,
    composer: known.composer ?? words.composer ?? null,
    source: known.source ?? words.source ?? null,
    notes: mergedNotes(known, words, isSameKey),
    stated: isSameKey ? { ...stated, ...known.stated } : known.stated,
  };
}

function mergedNotes(known: TuneContent, words: FileTune['words'], isSameKey: boolean): string | null {
  const { title, key, mode = 'major' } = words;
  const lines = [
    ...(title !== undefined && titleKey(title) !== titleKey(known.title) ? [`Also: ${title}`] : []),
    ...(key !== undefined && !isSameKey ? [`Also in ${key} ${mode}`] : []),
    ...(words.notes?.split('\n') ?? []),
  ];
  const there = new Set(known.notes?.split('\n'));
  const added = lines.filter((line) => line.trim() !== '' && !there.has(line));
  if (added.length === 0) return known.notes;
  const notes = [...(known.notes === null ? [] : [known.notes]), ...added].join('\n');
  // Too long for a note: what was there is worth more.
  return updateTuneSchema.shape.notes.safeParse(notes).success ? notes : known.notes;
}

function pitchClass(key: string): number | undefined {
  return parseTonic(key)?.pitchClass;
}
