import type { InstrumentKind } from './instrument';
import { NAMED_TUNINGS } from './named-tunings';
import type { Parsed } from './parsed';
import { read, refused } from './parsed';
import { midiOf, parsePitch, plainAccidentals } from './pitch';
import { lettersOf, nearestPitch, readNotes, spelled } from './short-name';
import { cannotRead, hasStrings, tellCapo, tellCount, tellPitch } from './tuning-refusals';

/** How an instrument stands: its strings, and where its capo is. */
export interface Tuned {
  /** Spelled pitches, one per course, as they are *without* the capo. */
  readonly pitches: readonly string[];
  /** Fret, 0 for none. */
  readonly capo: number;
}

export const HIGHEST_CAPO = 12;

/** Longer texts are no tuning; reading stays quick whatever is pasted. */
const LONGEST_TEXT = 120;
const CAPO = /(?:^|\s)capo(?:\s+(.*))?$/i;
const FULL_PITCH = /[\s-]*([A-Ga-g](?:##?|bb?)?\d)(?!\d)/y;

/**
 * A tuning as a person writes it: a short name (`AEAC#`), a full form (`A3 E4 A4 C#5`), either with
 * `capo N` behind; a banjo's short name may be spelled as it sounds with the capo (`aDADE`).
 *
 * @param statedCapo a capo given beside the text, in a field of its own; 0 states none
 * @example parseTuning(fiddle, 'AEAE') // { pitches: ['A3','E4','A4','E5'], capo: 0 }
 * @example parseTuning(banjo, 'aDADE') // { pitches: ['G4','C3','G3','C4','D4'], capo: 2 }
 * @example parseTuning(fiddle, 'GDA') // refused: A fiddle has 4 strings; GDA names 3: G D A.
 */
export function parseTuning(kind: InstrumentKind, text: string, statedCapo = 0): Parsed<Tuned> {
  const plain = text.trim();
  if (plain.length > LONGEST_TEXT) return refused(cannotRead(kind, plain, plain, []));
  if (/^any$/i.test(plain)) return refused('A tuning is needed here; any names none.');
  const capo = readCapo(plain);
  if (!capo.ok) return capo;
  if (!isCapo(statedCapo)) return refused(tellCapo(String(statedCapo)));
  const { strings, fret } = capo.value;
  if (fret !== null && statedCapo !== 0 && fret !== statedCapo) {
    return refused(`The capo is said twice: ${fret} in ${plain}, and ${statedCapo} beside it.`);
  }
  const capoStated = fret ?? (statedCapo === 0 ? null : statedCapo);
  const full = /\d/.test(strings);
  const pitches = full ? readFullForm(kind, plainAccidentals(strings)) : readShortName(kind, strings);
  if (!pitches.ok) return pitches;
  const spelling = full || capoStated !== null ? null : capoSpelling(kind, pitches.value);
  return read(spelling ?? { pitches: pitches.value, capo: capoStated ?? 0 });
}

function isCapo(fret: number): boolean {
  return Number.isInteger(fret) && fret >= 0 && fret <= HIGHEST_CAPO;
}

/** `fret` is null where the text says nothing of a capo; `capo 0` says that there is none. */
function readCapo(text: string): Parsed<{ readonly strings: string; readonly fret: number | null }> {
  const match = CAPO.exec(text);
  if (!match) return read({ strings: text, fret: null });
  const fret = match[1] ?? '';
  if (!/^\d{1,3}$/.test(fret) || !isCapo(Number(fret))) return refused(tellCapo(fret));
  return read({ strings: text.slice(0, match.index).trim(), fret: Number(fret) });
}

/** Every string with its octave. Spaces and hyphens may stand between. */
function readFullForm(kind: InstrumentKind, text: string): Parsed<readonly string[]> {
  const names: string[] = [];
  FULL_PITCH.lastIndex = 0;
  let end = 0;
  for (let match = FULL_PITCH.exec(text); match; match = FULL_PITCH.exec(text)) {
    const pitch = parsePitch(match[1]!);
    if (!pitch) return refused(tellPitch(kind, match[1]!));
    names.push(pitch.name);
    end = FULL_PITCH.lastIndex;
  }
  const rest = text.slice(end).replace(/^[\s-]+|[\s-]+$/g, '');
  if (rest !== '') {
    const part = /^\S+/.exec(rest)![0];
    const hint = /^[A-G][#b]?$/i.test(part) ? ' Give every string its octave, or none.' : '';
    return refused(cannotRead(kind, text, part, names) + hint);
  }
  return names.length === kind.courses.length ? read(names) : refused(tellCount(kind, text, names));
}

/** Letters only; each is the pitch nearest to its course's standard. */
function readShortName(kind: InstrumentKind, text: string): Parsed<readonly string[]> {
  if (text === '') return refused(`${hasStrings(kind)}; nothing is written.`);
  const reading = readNotes(text, kind.courses.length);
  if (!reading.ok) return refused(cannotRead(kind, text, reading.unread, reading.before.map(spelled)));
  const letters = reading.notes.map(spelled);
  if (letters.length !== kind.courses.length) return refused(tellCount(kind, text, letters));
  const names: string[] = [];
  for (const [index, note] of reading.notes.entries()) {
    const pitch = nearestPitch(note, kind.courses[index]!.standard);
    if (!pitch) return refused(tellPitch(kind, letters[index]!));
    names.push(pitch.name);
  }
  return read(names);
}

/**
 * A banjo with a capo is often named as it sounds: `aDADE` is `gCGCD capo 2`. So pitches that are a built-in
 * named tuning raised alike on all five strings are that tuning with the capo. No named tuning is another one
 * raised, so at most one fits and a named tuning stays itself.
 */
function capoSpelling(kind: InstrumentKind, pitches: readonly string[]): Tuned | null {
  if (kind.id !== 'banjo') return null;
  for (const tuning of NAMED_TUNINGS['banjo'] ?? []) {
    const raised = tuning.pitches.map((name, index) => midiOf(pitches[index]!) - midiOf(name));
    const capo = raised[0]!;
    if (capo >= 1 && capo <= HIGHEST_CAPO && raised.every((each) => each === capo)) {
      return { pitches: tuning.pitches, capo };
    }
  }
  return null;
}

/**
 * A cell of accepted tunings, first choice first, ` or ` between them; or `any` alone. A tuning that is
 * named twice counts once, where it stands first.
 * @example parseAccepted(fiddle, 'AEAE or GDAE') // two tunings
 * @example parseAccepted(fiddle, 'any') // 'any'
 */
export function parseAccepted(kind: InstrumentKind, cell: string): Parsed<readonly Tuned[] | 'any'> {
  if (/^any$/i.test(cell.trim())) return read('any');
  const accepted: Tuned[] = [];
  for (const part of cell.trim().split(/\s+or\s+/i)) {
    if (/^any\b/i.test(part.trim()))
      return refused('any stands alone: leave it out, or leave out the tunings.');
    const tuned = parseTuning(kind, part);
    if (!tuned.ok) return tuned;
    if (!accepted.some((other) => sameTuned(other, tuned.value))) accepted.push(tuned.value);
  }
  return read(accepted);
}

/**
 * The short name where reading it back gives the same pitches, as spelled; else the full form. A capo plays
 * no part: pegs that stand as a banjo's capo spelling are shown in full.
 * @example showTuning(dulcimer, ['D3','A3','G3']) // 'D3 A3 G3': DAG would be read with G4
 */
export function showTuning(kind: InstrumentKind, pitches: readonly string[]): string {
  const short = lettersOf(kind, pitches);
  const back = parseTuning(kind, short);
  const same = back.ok && back.value.capo === 0 && back.value.pitches.join(' ') === pitches.join(' ');
  return same ? short : pitches.join(' ');
}

/** @example showTuned(banjo, { pitches: ['G4','D3','G3','B3','D4'], capo: 2 }) // 'gDGBD capo 2' */
export function showTuned(kind: InstrumentKind, tuned: Tuned): string {
  const tuning = showTuning(kind, tuned.pitches);
  return tuned.capo === 0 ? tuning : `${tuning} capo ${tuned.capo}`;
}

/** Tunings are equal when they sound alike, string by string. */
export function sameTuning(a: readonly string[], b: readonly string[]): boolean {
  return a.length === b.length && a.every((name, index) => midiOf(name) === midiOf(b[index]!));
}

/** The same strings and the same capo. */
export function sameTuned(a: Tuned, b: Tuned): boolean {
  return a.capo === b.capo && sameTuning(a.pitches, b.pitches);
}
