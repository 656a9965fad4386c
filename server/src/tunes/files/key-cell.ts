import { MODES, type Mode } from '@pegwell/shared/music/mode';
import { read, refused, type Parsed } from '@pegwell/shared/music/parsed';
import { parseTonic, plainAccidentals } from '@pegwell/shared/music/pitch';
import { modeNamed } from './mode-word';

export interface KeyReading {
  readonly tonic: string | null;
  readonly mode: Mode | null;
}

const KEY = /^([A-Ga-g])(#|b|\s*-?(?:[Ss]harp|[Ff]lat)\b)?[\s-]*(.*)$/;

/**
 * The key and mode cells of a table. A key cell may hold both; empty cells say nothing.
 * @example readKeyCells('F# minor', '') // { tonic: 'F#', mode: 'minor' }
 * @example readKeyCells('Am', '') // { tonic: 'A', mode: 'minor' }
 */
export function readKeyCells(keyCell: string, modeCell: string): Parsed<KeyReading> {
  const mode = modeCell.trim() === '' ? null : modeNamed(modeCell);
  if (modeCell.trim() !== '' && mode === null) {
    return refused(`"${modeCell.trim().slice(0, 40)}" is no mode: it is one of ${MODES.join(', ')}.`);
  }
  const text = plainAccidentals(keyCell).trim();
  if (text === '' || /^none$/i.test(text)) return read({ tonic: null, mode });
  const [, letter = '', sign = '', rest = ''] = KEY.exec(text) ?? [];
  const accidental = /sharp/i.test(sign) ? '#' : /flat/i.test(sign) ? 'b' : sign;
  const tonic = parseTonic(letter + accidental);
  const modeInKey = rest === '' ? null : modeNamed(rest);
  if (!tonic || (rest !== '' && modeInKey === null)) {
    return refused(
      `"${text.slice(0, 40)}" is no key: it is a letter A to G, with # or b where it has one, as A, Bb, F#m, A dorian.`,
    );
  }
  if (mode !== null && modeInKey !== null && mode !== modeInKey) {
    return refused(`The key says ${modeInKey} and the mode says ${mode}.`);
  }
  return read({ tonic: tonic.name, mode: mode ?? modeInKey });
}
