import type { InstrumentKind } from './instrument';
import { hasLeastMargin, standardPitches } from './instrument';
import { midiOf } from './pitch';
import { retune } from './retune';
import { stepWords } from './step-words';
import type { Tuned } from './tuning';
import { pegNameInFull } from './words';

/**
 * Words of safety: a string raised too far can break and hurt an eye or a hand. The limits are common
 * practice (raising more than about a tone risks a break: C. Haigh, fiddlingaround.co.uk, cross tuning); the
 * string maker's advice and a luthier come first.
 */

/** From quiet to grave. `refused`: only the player at the peg can go on, knowingly. */
export const GRADES = ['none', 'note', 'caution', 'refused'] as const;
export type Grade = (typeof GRADES)[number];

export interface StringCaution {
  readonly courseIndex: number;
  readonly grade: Grade;
  /** Semitones of the target above the standard pitch; 0 or less where it is not above. */
  readonly aboveStandard: number;
  /** A step of more than 3 semitones, either way: in two goes, with a rest. */
  readonly twoGoes: boolean;
  readonly sentence: string;
}

export interface StringMaterial {
  /** Gut strings are one grade stricter. */
  readonly gut?: boolean;
}

export const LONGEST_SINGLE_STEP = 3;

/** Stands wherever a caution does. */
export const DEFERENCE =
  "These limits are common practice. The string maker's advice and a luthier come first.";

/**
 * How grave it is to bring a string up to `aboveStandard` semitones over its standard pitch.
 * Least margin (plain top strings, a banjo's fifth): caution on any raise, refused above +2.
 * Others: note at +2, caution above, refused above +4.
 * @example gradeOfRaise(2, false) // 'note'
 * @example gradeOfRaise(2, true) // 'caution'
 */
export function gradeOfRaise(
  aboveStandard: number,
  leastMargin: boolean,
  { gut = false }: StringMaterial = {},
): Grade {
  if (aboveStandard <= 0) return 'none';
  const [noteFrom, cautionFrom, refusedFrom] = leastMargin ? [1, 1, 3] : [2, 3, 5];
  const grade =
    aboveStandard >= refusedFrom ? 3 : aboveStandard >= cautionFrom ? 2 : aboveStandard >= noteFrom ? 1 : 0;
  return GRADES[Math.min(grade + (gut ? 1 : 0), 3)]!;
}

/**
 * What to look out for in a retune, one entry per course that has something to say, in string order. A raise
 * counts from the standard pitch, not from where the string stands; a string that comes down or stays has no
 * grade.
 * @param from spelled pitches; null where the player's strings are not known: then from standard
 * @param to spelled pitches
 */
export function cautions(
  kind: InstrumentKind,
  from: readonly string[] | null,
  to: readonly string[],
  material: StringMaterial = {},
): readonly StringCaution[] {
  const { deltas } = retune(kind, from ?? standardPitches(kind), to);
  return deltas.flatMap((delta, courseIndex) => {
    const aboveStandard = midiOf(to[courseIndex]!) - midiOf(kind.courses[courseIndex]!.standard);
    const grade =
      delta > 0 ? gradeOfRaise(aboveStandard, hasLeastMargin(kind, courseIndex), material) : 'none';
    const twoGoes = Math.abs(delta) > LONGEST_SINGLE_STEP;
    if (grade === 'none' && !twoGoes) return [];
    const sentence = wording(pegNameInFull(kind, courseIndex), grade, aboveStandard, twoGoes);
    return [{ courseIndex, grade, aboveStandard, twoGoes, sentence }];
  });
}

function wording(peg: string, grade: Grade, aboveStandard: number, twoGoes: boolean): string {
  const goes = twoGoes ? ' Go there in two goes, with a rest between.' : '';
  if (grade === 'none') return `${peg}: a long way.${goes}`;
  const height = `${peg}: ${stepWords(aboveStandard)} above its standard pitch.`;
  if (grade === 'note') return `${height} Bring it up slowly, from below.${goes}`;
  if (grade === 'caution') {
    return `${height} The string can break: face out of its line, bring it up slowly, stop if it resists.${goes}`;
  }
  return `${height} The string may well break and hurt an eye or a hand. Only the player at the peg can go on.${goes}`;
}

/** The gravest grade among them, `none` for an empty list. */
export function worstGrade(found: readonly StringCaution[]): Grade {
  return GRADES[Math.max(0, ...found.map(({ grade }) => GRADES.indexOf(grade)))]!;
}

/**
 * Where a tune accepts a tuning that raises less, that one, to be named beside the caution: the first
 * accepted one of a lower grade than the chosen one. Null where there is none or nothing to warn of.
 */
export function gentlerChoice(
  kind: InstrumentKind,
  from: readonly string[] | null,
  chosen: Tuned,
  accepted: readonly Tuned[] | 'any',
  material: StringMaterial = {},
): Tuned | null {
  if (accepted === 'any') return null;
  const rank = (tuned: Tuned): number =>
    GRADES.indexOf(worstGrade(cautions(kind, from, tuned.pitches, material)));
  const limit = rank(chosen);
  return accepted.find((tuned) => rank(tuned) < limit) ?? null;
}
