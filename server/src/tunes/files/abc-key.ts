import { plainAccidentals } from '@pegwell/shared/music/pitch';
import type { KeyReading } from './key-cell';
import { modeNamed, modeOf } from './mode-word';

const KEY = /^([A-G])([#b]?)\s*([A-Za-z]*)(.*)/s;
/** No part of the standard, but `K:em` is written. */
const SMALL = /^([a-g])([#b]?)\s*([A-Za-z]*)$/;

/**
 * A `K:` field, ABC 2.1 section 3.1.14. A tonic without a mode is major; accidentals (`^f`), `clef=` and the like
 * behind (4.6) are no part of a key; `exp` leaves the mode unsaid. Empty, `none`, and the pipes' `HP` and `Hp` name no
 * tonic.
 * @example readAbcKey('Ador clef=bass') // { tonic: 'A', mode: 'dorian' }
 * @example readAbcKey('Hp') // { tonic: null, mode: null }
 */
export function readAbcKey(text: string): KeyReading {
  const plain = plainAccidentals(text).trim();
  const [, small = '', sign = '', smallMode = ''] = SMALL.exec(plain) ?? [];
  if (small !== '' && (smallMode === '' || modeNamed(smallMode) !== null)) {
    return { tonic: small.toUpperCase() + sign, mode: modeNamed(smallMode) ?? 'major' };
  }
  const match = KEY.exec(plain);
  if (!match) return { tonic: null, mode: null };
  const [, letter = '', accidental = '', word = '', rest = ''] = match;
  return { tonic: letter + accidental, mode: word === 'exp' ? null : (modeOf(word) ?? laterMode(rest)) };
}

/** `K:A harmonic minor`: a mode that is spelled out behind another word. */
function laterMode(rest: string) {
  const [word = ''] =
    /\b(?:major|minor|mixolydian|dorian|aeolian|phrygian|lydian|locrian|modal)\b/i.exec(rest) ?? [];
  return modeNamed(word) ?? 'major';
}
