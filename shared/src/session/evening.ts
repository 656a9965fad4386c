import type { InstrumentKind } from '../music/instrument';
import type { Tuned } from '../music/tuning';

/**
 * The evening as the score sees it: who retunes, where everyone starts, which tunes in which order.
 * Pure data, parsed and checked: every tuning has the number of strings of its kind, every id in
 * `sets` is a tune's, and no id stands there twice.
 */
export interface Evening {
  /** The kinds in the room that retune, each once, `count` at least 1. */
  readonly chairs: readonly Chair[];
  /** By kind id. `null`: "tune to the first tune", the first stated tuning is free. */
  readonly openings: Readonly<Record<string, Tuned | null>>;
  readonly goal: Goal;
  /** Rhythms of which two should not follow each other inside a set; compared without case. */
  readonly spacedRhythms: readonly string[];
  readonly tunes: readonly EveningTune[];
  /** The running order by tune id, set by set. Empty sets count as none. */
  readonly sets: readonly (readonly string[])[];
  /** Runs of ids played without stopping. */
  readonly medleys: readonly (readonly string[])[];
}

export interface Chair {
  readonly kind: InstrumentKind;
  readonly count: number;
}

/** `pegs`: fewest peg changes first. `stops`: fewest stops first (levels 1 and 2 change places). */
export type Goal = 'pegs' | 'stops';

export interface EveningTune {
  /** A label: a tune played twice has two. */
  readonly id: string;
  /** Pitch class of the tonic, 0 (C) to 11 (B). */
  readonly tonic: number;
  /** Any word, or null where none is known (an open place). */
  readonly rhythm: string | null;
  /** By kind id: accepted tunings, first choice first. A kind that is absent plays the tune as it stands. */
  readonly accepted: Readonly<Record<string, readonly Tuned[] | 'any'>>;
}

export interface Score {
  readonly pegChanges: number;
  readonly retuneStops: number;
  readonly ruleBreaks: number;
  readonly secondChoices: number;
  readonly capoMoves: number;
  readonly keyChanges: number;
  readonly semitones: number;
  readonly offClockPegChanges: number;
}

/** What one kind does at one place. Figures are per chair. */
export interface KindMove {
  readonly kind: string;
  /** Null while the kind is free (nothing stated yet and an opening of null). */
  readonly from: Tuned | null;
  readonly to: Tuned | null;
  /** Semitones per course, 0 where the string stays or the kind is free. */
  readonly deltas: readonly number[];
  readonly pegChanges: number;
  /** The position in the tune's accepted list that is played, 0 for `any`. */
  readonly choice: number;
}

/** The place before a tune. */
export interface Place {
  readonly before: string;
  readonly offClock: boolean;
  /** Over all chairs. */
  readonly pegChanges: number;
  /** Every kind with chairs, by kind id. */
  readonly kinds: readonly KindMove[];
}

export interface Scored {
  readonly score: Score;
  /** One per tune, in playing order. */
  readonly places: readonly Place[];
}
