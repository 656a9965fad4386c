import { plainAccidentals } from '@pegwell/shared/music/pitch';
import type { KeyReading } from './key-cell';
import { modeOf } from './mode-word';

const KEY = /^([A-G])([#b]?)\s*([A-Za-z]*)/;

/**
 * A `K:` field, ABC 2.1 section 3.1.14. A tonic without a mode is major; accidentals (`^f`), `clef=` and the like
 * behind (4.6) are no part of a key; `exp` leaves the mode unsaid. Empty, `none`, and the pipes' `HP` and `Hp` name no
 * tonic.
 * @example readAbcKey('Ador clef=bass') // { tonic: 'A', mode: 'dorian' }
 * @example readAbcKey('Hp') // { tonic: null, mode: null }
 */
export function readAbcKey(text: string): KeyReading {
  const match = KEY.exec(plainAccidentals(text).trim());
  if (!match) return { tonic: null, mode: null };
  const [, letter = '', accidental = '', word = ''] = match;
  return { tonic: letter + accidental, mode: word === 'exp' ? null : (modeOf(word) ?? 'major') };
}
