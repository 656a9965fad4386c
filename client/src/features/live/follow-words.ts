import type { FollowMove, FollowTune } from '@pegwell/shared/contract/live';
import { builtInKind, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { noteOf } from '@pegwell/shared/music/pitch';
import type { Tuned } from '@pegwell/shared/music/tuning';
import { capoWords } from '@pegwell/shared/music/words';
import { count } from '../../lib/format';
import { keyWords } from '../../music/key-words';

type Titled = Pick<FollowTune, 'title' | 'key' | 'mode' | 'rhythm' | 'minutes'>;

/** An open place has no title: it is named by what may be called there. */
export const titleOf = ({ title, key, mode }: Titled): string => title ?? `${keyWords(key, mode)} tunes`;

/** Under the title: `D · waltz`, or for an open place `open · 40 min · whoever calls`. */
export function underTitle({ title, key, mode, rhythm, minutes }: Titled): string {
  if (title === null) {
    return ['open place', minutes === null ? '' : `${minutes} min`, 'whoever calls']
      .filter(Boolean)
      .join(' · ');
  }
  return rhythm ? `${keyWords(key, mode)} · ${rhythm}` : keyWords(key, mode);
}

/** What a move comes to in a word or two: `stay`, `1 peg`, `capo on at fret 2`, `2 pegs, capo off`. */
export function priceOf(move: FollowMove | null): string {
  if (!move) return 'stay';
  const pegs = move.pegChanges > 0 ? count(move.pegChanges, 'peg') : '';
  return [pegs, capoOf(move)].filter(Boolean).join(', ');
}

/** `retune 1 peg`, `retune 2 pegs, capo off`, `capo on at fret 2`; a sentence's part for a label. */
export function retuneLabel(move: FollowMove): string {
  return move.pegChanges > 0 ? `retune ${priceOf(move)}` : priceOf(move);
}

/** `Retune 1 peg now`; with a capo `Now retune 2 pegs, capo off`. */
export function turnNow(move: FollowMove): string {
  const label = retuneLabel(move);
  return capoOf(move) === '' ? `${capital(label)} now` : `Now ${label}`;
}

/** What is done, in words and in order: a capo that goes is first, one that comes is last. */
export function inOrder(capo: string, turned: readonly string[], to: Tuned): readonly string[] {
  if (capo === '') return turned;
  return to.capo === 0 ? [capital(capo), ...turned] : [...turned, capital(capo)];
}

function capoOf({ capoFrom, capoTo }: FollowMove): string {
  return capoFrom === null || capoTo === null ? '' : capoWords(capoFrom, capoTo);
}

/** How the instrument stands before and after; null while the kind is free. */
export function sidesOf(move: FollowMove): { readonly from: Tuned; readonly to: Tuned } | null {
  const { fromPitches, toPitches, capoFrom, capoTo } = move;
  if (!fromPitches || !toPitches || capoFrom === null || capoTo === null) return null;
  return { from: { pitches: fromPitches, capo: capoFrom }, to: { pitches: toPitches, capo: capoTo } };
}

/** `your fiddle` */
export const yours = (kind: InstrumentKind): string => `your ${kind.name.toLowerCase()}`;

/** A sentence begins with it. */
export const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/**
 * The letters of a tuning one by one, to stand large over their strings: in lower case where the string's
 * short name is (a banjo's fifth).
 * @example stringLetters(banjo, ['G4','D3','G3','B3','D4']) // ['g', 'D', 'G', 'B', 'D']
 */
export function stringLetters(kind: InstrumentKind, pitches: readonly string[]): readonly string[] {
  return pitches.map((pitch, index) => {
    const name = kind.courses[index]?.name ?? '';
    const note = noteOf(pitch);
    return name !== '' && name === name.toLowerCase() ? note.charAt(0).toLowerCase() + note.slice(1) : note;
  });
}

/** The instruments to choose from: those that retune in this room first. */
export function kindsInRoom(ids: readonly string[]): readonly InstrumentKind[] {
  return ids.flatMap((id) => builtInKind(id) ?? []);
}

/** How long ago, short: `8 s`, `2 min`, `3 h`. */
export function agoOf(ms: number): string {
  const seconds = Math.max(0, Math.round(ms / 1_000));
  if (seconds < 90) return `${seconds} s`;
  if (seconds < 5_400) return `${Math.round(seconds / 60)} min`;
  return `${Math.round(seconds / 3_600)} h`;
}

/**
 * How long it stays as it is, before the next retune: a sentence for between two tunes.
 * @param retuneIn tunes still to be played before it, the current one included
 * @param turning while there is something to turn for the current one
 */
export function untilRetune(retuneIn: number | null, turning = false): string {
  if (retuneIn === null) return 'Nothing more to turn this evening.';
  if (retuneIn <= 1) return '';
  return `${turning ? 'Then stay' : 'Stay'} as you are for ${count(retuneIn, 'tune')}, this one included.`;
}
