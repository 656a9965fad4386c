import type { Evening, Score } from '@pegwell/shared/session/evening';

/**
 * An evening whose order is asked for. `sets` are the host's order and the sizes of the sets; they name every
 * tune that is to be played, once. Medleys and pairs that name other ids say nothing.
 */
export interface OrderingProblem extends Evening {
  /** By tune id: the position it keeps, counted from 0 through the whole evening. */
  readonly pins: Readonly<Record<string, number>>;
  /** The first of a pair is played before the second. */
  readonly befores: readonly (readonly [string, string])[];
  /** How many steps the search may take; the same number gives the same answer. */
  readonly stepBudget?: number;
}

export type RuleName = 'pin' | 'medley' | 'before';

export interface ClashingRule {
  readonly rule: RuleName;
  readonly ids: readonly string[];
}

export interface Solution {
  readonly outcome: 'solution';
  /** The order, in sets of the host's sizes (empty ones too). */
  readonly sets: readonly (readonly string[])[];
  readonly score: Score;
  /** k: no order that keeps the rules has a smaller prefix of k levels, in the goal's order of levels. */
  readonly provenLevels: number;
  readonly optimal: boolean;
  /** Of the first level: no order that keeps the rules has less. */
  readonly lowerBound: number;
  /** Ids of entries at another position than the host's. */
  readonly moved: readonly string[];
  readonly steps: number;
  /** What ended the search before it had proved everything; null where nothing did. */
  readonly stopped: 'steps' | 'time' | null;
}

/** Rules that cannot all hold; without any one of them the others can. */
export interface Clash {
  readonly outcome: 'clash';
  readonly clashes: readonly ClashingRule[];
}

/** The budget ended before it was known whether the rules can all hold. */
export interface Undecided {
  readonly outcome: 'undecided';
  readonly stopped: 'steps' | 'time';
}

export type Answer = Solution | Clash | Undecided;
