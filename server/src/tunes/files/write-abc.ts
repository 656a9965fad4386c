import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import type { Mode } from '@pegwell/shared/music/mode';
import type { StoredTune } from '../tune-content';
import { encodeText } from './abc-text';
import { showCell } from './show-cell';

/**
 * `modal` is no mode of ABC: other programs read mixolydian, whose seventh is low as well, and import reads
 * the directive beside it.
 */
const MODE_WORDS: Readonly<Record<Mode, string>> = {
  major: 'maj',
  minor: 'min',
  mixolydian: 'mix',
  dorian: 'dor',
  aeolian: 'aeo',
  phrygian: 'phr',
  lydian: 'lyd',
  locrian: 'loc',
  modal: 'mix',
};

/** The library as ABC 2.1 tune headers, numbered from 1, in UTF-8. Importing it again changes nothing. */
export function writeAbc(tunes: readonly StoredTune[]): string {
  const written = tunes.map((tune, index) => writeTune(tune, index + 1));
  return ['%abc-2.1\nI:abc-creator Pegwell\n', ...written].join('\n');
}

function writeTune(tune: StoredTune, number: number): string {
  const line = (letter: string, text: string | null) =>
    text === null ? [] : [`${letter}:${encodeText(text)}`];
  const tunings = BUILT_IN_KINDS.flatMap((kind) => {
    const accepted = tune.stated[kind.id];
    return accepted === undefined ? [] : [`%%pegwell-tuning ${kind.id} ${showCell(kind, accepted)}`];
  });
  return [
    `X:${number}`,
    ...line('T', tune.title),
    ...line('C', tune.composer),
    ...line('S', tune.source),
    ...line('R', tune.rhythm),
    ...line('P', tune.parts),
    ...(tune.notes === null ? [] : tune.notes.split('\n').flatMap((text) => line('N', text))),
    `%%pegwell-id ${tune.id}`,
    ...(tune.mode === 'modal' ? ['%%pegwell-mode modal'] : []),
    ...tunings,
    `K:${tune.key}${MODE_WORDS[tune.mode]}`,
    '',
  ].join('\n');
}
