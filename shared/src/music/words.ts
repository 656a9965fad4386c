import type { InstrumentKind } from './instrument';
import { midiOf, noteOf } from './pitch';
import { retune } from './retune';
import type { StepTerms } from './step-words';
import { signedSemitones, stepWords } from './step-words';
import type { Tuned } from './tuning';

/** One course turned from one pitch to another, worded once for board, phone, console and sheet. */
export interface TurnWords {
  readonly direction: 'up' | 'down' | 'stays';
  /** Signed, 0 where it stays. */
  readonly semitones: number;
  /** `+2`, to stand behind the words. */
  readonly number: string;
  /** `D peg up a whole step, to E` */
  readonly short: string;
  /** `D peg (3rd): up a whole step, from D to E` */
  readonly full: string;
  /** `full` for a voice: accidentals are words. */
  readonly spoken: string;
}

/**
 * The standing name of a course's peg, whatever it is tuned to. Where two strings share a letter (a guitar's
 * two E, a banjo's D and G), the string is named with it: turning the wrong one can break it.
 * @example pegName(fiddle, 1) // 'D peg'
 * @example pegName(banjo, 1) // 'D peg (4th)'
 * @example pegName(mandolin, 0) // 'G pegs'
 */
export function pegName(kind: InstrumentKind, courseIndex: number): string {
  const { name } = courseAt(kind, courseIndex);
  const alike = kind.courses.filter((course) => course.name.toLowerCase() === name.toLowerCase());
  return alike.length > 1 ? pegNameInFull(kind, courseIndex) : pegs(kind, courseIndex);
}

/** @example pegNameInFull(fiddle, 1) // 'D peg (3rd)' */
export function pegNameInFull(kind: InstrumentKind, courseIndex: number): string {
  return `${pegs(kind, courseIndex)} (${courseAt(kind, courseIndex).ordinal})`;
}

function pegs(kind: InstrumentKind, courseIndex: number): string {
  const course = courseAt(kind, courseIndex);
  return `${course.name} ${course.pegs > 1 ? 'pegs' : 'peg'}`;
}

function courseAt(kind: InstrumentKind, courseIndex: number): InstrumentKind['courses'][number] {
  const course = kind.courses[courseIndex];
  if (!course) throw new RangeError(`A ${kind.id} has no course ${courseIndex}`);
  return course;
}

/**
 * @param fromPitch spelled, `D4`
 * @param toPitch spelled, `E4`
 * @example turnWords(fiddle, 1, 'D4', 'E4').short // 'D peg up a whole step, to E'
 * @example turnWords(fiddle, 0, 'A3', 'G3').full // 'G peg (4th): down a whole step, from A to G'
 */
export function turnWords(
  kind: InstrumentKind,
  courseIndex: number,
  fromPitch: string,
  toPitch: string,
  terms: StepTerms = 'steps',
): TurnWords {
  const semitones = midiOf(toPitch) - midiOf(fromPitch);
  const from = noteOf(fromPitch);
  const to = noteOf(toPitch);
  const peg = pegName(kind, courseIndex);
  const inFull = pegNameInFull(kind, courseIndex);
  if (semitones === 0) {
    const stays = kind.courses[courseIndex]!.pegs > 1 ? 'stay' : 'stays';
    const full = `${inFull}: ${stays} at ${to}`;
    const short = `${peg} ${stays} at ${to}`;
    return { direction: 'stays', semitones, number: '0', short, full, spoken: aloud(full) };
  }
  const direction = semitones > 0 ? 'up' : 'down';
  const step = stepWords(semitones, terms);
  // A turn of an octave ends on its own letter: only there the octaves are said.
  const [start, end] = from === to ? [fromPitch, toPitch] : [from, to];
  const full = `${inFull}: ${direction} ${step}, from ${start} to ${end}`;
  return {
    direction,
    semitones,
    number: signedSemitones(semitones),
    short: `${peg} ${direction} ${step}, to ${end}`,
    full,
    spoken: aloud(full),
  };
}

function aloud(words: string): string {
  return words
    .replace(
      /\b([A-Ga-g])(##|bb)/g,
      (_, letter, sign) => `${letter} double ${sign === '##' ? 'sharp' : 'flat'}`,
    )
    .replace(/\b([A-Ga-g])#/g, '$1 sharp')
    .replace(/\b([A-Ga-g])b(?![a-z])/g, '$1 flat');
}

/**
 * The courses that turn, in the order to turn them: those that come down, then those that go up, so that the
 * top of the instrument never carries more than it did.
 * @example turningOrder([2, 0, -2, -2]) // [2, 3, 0]
 */
export function turningOrder(deltas: readonly number[]): readonly number[] {
  const indexes = deltas.map((_, index) => index);
  return [...indexes.filter((index) => deltas[index]! < 0), ...indexes.filter((index) => deltas[index]! > 0)];
}

/** The turns from one tuning to another, in turning order; empty where no peg turns. */
export function turns(
  kind: InstrumentKind,
  from: readonly string[],
  to: readonly string[],
  terms: StepTerms = 'steps',
): readonly TurnWords[] {
  const { deltas } = retune(kind, from, to);
  return turningOrder(deltas).map((index) => turnWords(kind, index, from[index]!, to[index]!, terms));
}

/**
 * All turns in one line, without the capo.
 * @example retuneWords(fiddle, ['G3','D4','A4','E5'], ['G3','D4','G4','D5'])
 *   // 'A peg down a whole step, to G; E peg down a whole step, to D'
 */
export function retuneWords(
  kind: InstrumentKind,
  from: readonly string[],
  to: readonly string[],
  terms: StepTerms = 'steps',
): string {
  return turns(kind, from, to, terms)
    .map(({ short }) => short)
    .join('; ');
}

/**
 * What a capo does, empty where it stays. A banjo's spike is no part of it.
 * @example capoWords(0, 2) // 'capo on at fret 2'
 * @example capoWords(2, 4) // 'capo from 2 to 4'
 * @example capoWords(2, 0) // 'capo off'
 */
export function capoWords(from: number, to: number): string {
  if (from === to) return '';
  if (to === 0) return 'capo off';
  return from === 0 ? `capo on at fret ${to}` : `capo from ${from} to ${to}`;
}

/**
 * Pegs and capo in one line; `nothing to turn` where both stay. A capo that goes is named first, one that
 * comes last: pegs are turned without it.
 * @example moveWords(banjo, openG, { ...doubleC, capo: 2 }) // '…; capo on at fret 2'
 */
export function moveWords(kind: InstrumentKind, from: Tuned, to: Tuned, terms: StepTerms = 'steps'): string {
  const strings = retuneWords(kind, from.pitches, to.pitches, terms);
  const capo = capoWords(from.capo, to.capo);
  const parts = to.capo === 0 ? [capo, strings] : [strings, capo];
  return parts.filter((part) => part !== '').join('; ') || 'nothing to turn';
}
