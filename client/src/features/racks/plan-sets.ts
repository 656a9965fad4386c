import type { RackPlan, RackTurn, Racks } from '@pegwell/shared/contract/racks';
import type { ShownTuning } from '@pegwell/shared/contract/tunes';
import { titleOf, tunedText } from './rack-words';

export interface PlanTune {
  readonly id: string;
  /** Counted from 1 through the evening. */
  readonly number: number;
  readonly title: string;
  readonly asItStands: boolean;
}

/** Tunes in a row on one instrument in one tuning. */
export interface Stretch {
  readonly instrument: number;
  readonly tuned: ShownTuning | null;
  readonly tunes: readonly PlanTune[];
}

/** Pegs turned at one place. */
export interface Turning {
  readonly before: PlanTune;
  readonly offClock: boolean;
  readonly turns: readonly { readonly turn: RackTurn; readonly needed: PlanTune }[];
}

export type PlanStep =
  | { readonly stretch: Stretch; readonly turning?: never }
  | { readonly turning: Turning; readonly stretch?: never };

export interface PlanSet {
  readonly id: string;
  readonly title: string;
  readonly steps: readonly PlanStep[];
}

/** A plan as it is followed: set by set, what is turned and what is played, in order. Empty sets are left out. */
export function planSets(sets: Racks['evening']['sets'], plan: RackPlan): readonly PlanSet[] {
  const played = new Map(plan.tunes.map((tune) => [tune.entryId, tune]));
  const tunes = new Map<string, PlanTune>();
  for (const tune of sets.flatMap((set) => set.tunes)) {
    const asItStands = played.get(tune.id)?.asItStands ?? false;
    tunes.set(tune.id, { id: tune.id, number: tunes.size + 1, title: titleOf(tune), asItStands });
  }
  return sets
    .filter((set) => set.tunes.length > 0)
    .map(({ id, title, tunes: entries }) => {
      const steps: PlanStep[] = [];
      for (const entry of entries) {
        const [tune, here] = [tunes.get(entry.id), played.get(entry.id)];
        if (!tune || !here) continue;
        const turns = plan.turns
          .filter(({ before }) => before === entry.id)
          .map((turn) => ({ turn, needed: tunes.get(turn.needed) ?? tune }));
        const [first] = turns;
        if (first) steps.push({ turning: { before: tune, offClock: first.turn.offClock, turns } });
        const last = steps.at(-1)?.stretch;
        if (last && last.instrument === here.instrument && sameTuned(last.tuned, here.tuned)) {
          steps[steps.length - 1] = { stretch: { ...last, tunes: [...last.tunes, tune] } };
        } else {
          const { instrument, tuned } = here;
          steps.push({ stretch: { instrument, tuned, tunes: [tune] } });
        }
      }
      return { id, title, steps };
    });
}

const sameTuned = (a: ShownTuning | null, b: ShownTuning | null) =>
  (a && tunedText(a)) === (b && tunedText(b));
