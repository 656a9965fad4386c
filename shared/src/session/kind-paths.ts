import { standardPitches, type InstrumentKind } from '../music/instrument';
import { midiOf } from '../music/pitch';
import { retune, type Retune } from '../music/retune';
import type { Tuned } from '../music/tuning';
import type { Chair, Evening } from './evening';
import type { OrderPlace } from './running-order';

/** One way a kind may stand after a tune. `tuned` is null while the kind is free. */
export interface Stand {
  readonly tuned: Tuned | null;
  /** Position in the tune's accepted list, the smallest where the list repeats itself; 0 for `any`. */
  readonly position: number;
  /** Two stands are the same where these are: tunings by MIDI number, and the capo. */
  readonly same: string;
}

/** From one stand to the next over a place. Figures are over all chairs of the kind. */
export interface Step {
  /** Index among the stands after the place. */
  readonly to: number;
  readonly pegs: number;
  readonly semitones: number;
  readonly turns: boolean;
  /** Changes tuning or capo: what breaks a medley. Being first stated changes nothing. */
  readonly changes: boolean;
  readonly second: number;
  readonly capo: number;
  /** The same retune for one chair. */
  readonly perChair: { readonly deltas: readonly number[]; readonly pegChanges: number };
}

/** All ways one kind can go through the evening: a graph in layers, one per place. */
export interface KindPaths {
  readonly kind: InstrumentKind;
  /** `stands[0]` is the opening alone; `stands[i + 1]` the ways to stand for the tune at place i. */
  readonly stands: readonly (readonly Stand[])[];
  /** `steps[i][s]`: from stand s before place i, in the order of the accepted list. */
  readonly steps: readonly (readonly (readonly Step[])[])[];
}

/** The graph of one kind, every choice still open. */
export function kindPaths(evening: Evening, chair: Chair, places: readonly OrderPlace[]): KindPaths {
  const { kind, count } = chair;
  const still = {
    pegs: 0,
    semitones: 0,
    turns: false,
    changes: false,
    second: 0,
    capo: 0,
    perChair: { deltas: kind.courses.map(() => 0), pegChanges: 0 },
  };
  const retuneOf = rememberedRetunes(kind);
  const opening = evening.openings[kind.id];
  const arrival = opening === undefined ? { pitches: standardPitches(kind), capo: 0 } : opening;
  const stands: (readonly Stand[])[] = [[standOf(arrival, 0)]];
  const steps: (readonly (readonly Step[])[])[] = [];
  for (const place of places) {
    const before = stands[stands.length - 1]!;
    const accepted = place.tune.accepted[kind.id] ?? 'any';
    if (accepted === 'any' || accepted.length === 0) {
      stands.push(before.map((stand) => ({ ...stand, position: 0 })));
      steps.push(before.map((_, to) => [{ ...still, to }]));
      continue;
    }
    const after = withoutRepeats(accepted.map(standOf));
    stands.push(after);
    steps.push(before.map((from) => after.map((stand, to) => stepTo(from, stand, to, place.offClock))));
  }
  return { kind, stands, steps };

  function stepTo(from: Stand, stand: Stand, to: number, offClock: boolean): Step {
    const second = stand.position > 0 ? count : 0;
    if (from.tuned === null || stand.tuned === null || from.same === stand.same) {
      return { ...still, to, second };
    }
    const { deltas, pegChanges, semitones } = retuneOf(from.tuned, stand.tuned);
    const capoMoved = from.tuned.capo !== stand.tuned.capo;
    return {
      to,
      pegs: count * pegChanges,
      semitones: count * semitones,
      turns: pegChanges > 0,
      changes: true,
      second,
      capo: capoMoved && !offClock ? count : 0,
      perChair: { deltas, pegChanges },
    };
  }
}

/**
 * Only the paths with the fewest peg changes. They are found kind by kind, because peg changes add up over
 * kinds: where they are the first level, no other path can be part of the best choice.
 */
export function fewestPegs(paths: KindPaths): KindPaths {
  const { stands, steps } = paths;
  const toGo = leastToGo(paths, (step) => step.pegs);
  let reached = new Set([0]);
  const kept = steps.map((layer, place) => {
    const next = new Set<number>();
    const keptLayer = layer.map((from, stand) => {
      if (!reached.has(stand)) return [];
      const best = from.filter((step) => step.pegs + toGo[place + 1]![step.to]! === toGo[place]![stand]!);
      for (const step of best) next.add(step.to);
      return best;
    });
    reached = next;
    return keptLayer;
  });
  return { kind: paths.kind, stands, steps: kept };
}

/** The least sum of a figure from each stand to the end; Infinity for stands that no kept path leaves. */
export function leastToGo({ stands, steps }: KindPaths, figure: (step: Step) => number): readonly number[][] {
  const toGo: number[][] = stands.map((layer) => layer.map(() => 0));
  for (let place = steps.length - 1; place >= 0; place--) {
    steps[place]!.forEach((from, stand) => {
      let least = Infinity;
      for (const step of from) least = Math.min(least, figure(step) + toGo[place + 1]![step.to]!);
      toGo[place]![stand] = least;
    });
  }
  return toGo;
}

function standOf(tuned: Tuned | null, position: number): Stand {
  return { tuned, position, same: tuned === null ? '' : `${soundOf(tuned.pitches)} ${tuned.capo}` };
}

function withoutRepeats(stands: readonly Stand[]): readonly Stand[] {
  const seen = new Set<string>();
  return stands.filter(({ same }) => !seen.has(same) && seen.add(same));
}

/** Spelling is read once per list of pitches: a board is scored again with every card that moves. */
const sounds = new WeakMap<readonly string[], string>();

function soundOf(pitches: readonly string[]): string {
  const known = sounds.get(pitches);
  if (known !== undefined) return known;
  const sound = pitches.map(midiOf).join(',');
  sounds.set(pitches, sound);
  return sound;
}

function rememberedRetunes(kind: InstrumentKind): (from: Tuned, to: Tuned) => Retune {
  const known = new Map<string, Retune>();
  return (from, to) => {
    const key = `${from.pitches.join(' ')}>${to.pitches.join(' ')}`;
    const remembered = known.get(key);
    if (remembered !== undefined) return remembered;
    const found = retune(kind, from.pitches, to.pitches);
    known.set(key, found);
    return found;
  };
}
