import { choiceBounds, type ChoiceBounds } from './choice-bounds';
import type { KindPaths, Step } from './kind-paths';
import { compareLevels, type Level } from './levels';
import type { OrderPlace } from './running-order';

/**
 * A choice made up to some place and kind. Two with the same stands and flags have the same future, so only
 * the better is kept; of equals the earlier, which is the lexicographically smaller.
 */
interface Half {
  /** Per kind the stand it has now: after the place for kinds that have chosen, before it for the others. */
  readonly stands: readonly number[];
  /** At this place somebody has turned (on the clock), or changed (inside a medley). */
  readonly turned: boolean;
  readonly broken: boolean;
  /** In the order of the levels. Key changes and spaced rhythms depend on no choice and are left out. */
  readonly cost: readonly number[];
  readonly before: Half | null;
}

/** How much a search may do; tests narrow it to reach the guided passes with small evenings. */
export interface ChoiceLimits {
  /** Halves kept per layer before bounds are called for: far more than the choices of real evenings leave. */
  readonly width: number;
  /** Halves made in the plain pass and, about, in the guided one. */
  readonly quick: number;
  /** Halves made in the exact pass before the guided choice stands: about a second. */
  readonly exact: number;
}
const LIMITS: ChoiceLimits = { width: 400, quick: 60_000, exact: 300_000 };

/**
 * The best choice of every kind at every place, all together: the first by the levels in `order`, then by
 * the list of accepted-list positions in playing order and by kind, in the order given.
 *
 * A dynamic program over (place, kind): each layer holds the halves that differ in what can follow. Halves
 * are made in lexicographic order and stay in it, so the first of equals is the smallest. Where a layer
 * grows wide, a narrow guided pass finds a good choice first, and then all halves that cannot reach it are
 * left out: still exact. Only beyond the last limit, which takes an input made for it, the guided choice stands.
 *
 * @returns per place and kind the index of the stand after the place
 */
export function bestChoices(
  kinds: readonly KindPaths[],
  places: readonly OrderPlace[],
  order: readonly Level[],
  limits: ChoiceLimits = LIMITS,
): readonly (readonly number[])[] {
  const search = new ChoiceSearch(kinds, places, order, limits);
  return search.run();
}

class ChoiceSearch {
  private made = 0;
  private bounds: ChoiceBounds | null = null;

  constructor(
    private readonly kinds: readonly KindPaths[],
    private readonly places: readonly OrderPlace[],
    private readonly order: readonly Level[],
    private readonly limits: ChoiceLimits,
  ) {}

  run(): readonly (readonly number[])[] {
    const plain = this.pass(this.limits.width, this.limits.quick, null);
    if (plain !== 'too wide') return this.listed(plain);
    this.bounds = choiceBounds(this.kinds, this.places, this.order);
    const guided = this.pass(this.guidedWidth(), Infinity, null);
    if (guided === 'too wide') throw new Error('A guided pass narrows every layer');
    const exact = this.pass(Infinity, this.limits.exact, guided.cost);
    return this.listed(exact === 'too wide' ? guided : exact);
  }

  /** As wide as the number of steps allows, so that a long evening of long lists takes no longer. */
  private guidedWidth(): number {
    let perWidth = 0;
    for (const { steps } of this.kinds) for (const layer of steps) perWidth += layer[0]?.length ?? 0;
    return Math.max(1, Math.min(this.limits.width, Math.floor(this.limits.quick / perWidth)));
  }

  /** One walk through all layers. `atMost` leaves out what cannot cost that little. */
  private pass(width: number, most: number, atMost: readonly number[] | null): Half | 'too wide' {
    this.made = 0;
    let layer: readonly Half[] = [
      {
        stands: this.kinds.map(() => 0),
        turned: false,
        broken: false,
        cost: this.order.map(() => 0),
        before: null,
      },
    ];
    for (let place = 0; place < this.places.length; place++) {
      for (let kind = 0; kind < this.kinds.length; kind++) {
        layer = this.next(layer, place, kind, atMost);
        if (this.made > most) return 'too wide';
        if (layer.length <= width) continue;
        if (this.bounds === null) return 'too wide';
        layer = this.narrowed(layer, place, kind, width);
      }
    }
    let best = layer[0]!;
    for (const half of layer) if (compareLevels(half.cost, best.cost) < 0) best = half;
    return best;
  }

  private next(
    layer: readonly Half[],
    place: number,
    kind: number,
    atMost: readonly number[] | null,
  ): Half[] {
    const last = kind === this.kinds.length - 1;
    const steps = this.kinds[kind]!.steps[place]!;
    const known = new Map<string, Half>();
    for (const half of layer) {
      for (const step of steps[half.stands[kind]!]!) {
        const made = this.extended(half, step, this.places[place]!, kind);
        this.made++;
        if (atMost !== null && this.cannotReach(made, place, kind, atMost)) continue;
        const after = last ? { ...made, turned: false, broken: false } : made;
        const key = keyOf(after);
        const rival = known.get(key);
        if (rival !== undefined && compareLevels(rival.cost, after.cost) <= 0) continue;
        // Taken out first, so that the map keeps its halves in lexicographic order.
        known.delete(key);
        known.set(key, after);
      }
    }
    return [...known.values()];
  }

  private extended(half: Half, step: Step, place: OrderPlace, kind: number): Half {
    const turns = step.turns && !place.offClock;
    const breaks = step.changes && place.inMedley;
    const cost = this.order.map((level, index) => half.cost[index]! + added(level));
    return {
      stands: half.stands.map((stand, k) => (k === kind ? step.to : stand)),
      turned: half.turned || turns,
      broken: half.broken || breaks,
      cost,
      before: half,
    };

    function added(level: Level): number {
      switch (level) {
        case 'pegChanges':
          return step.pegs;
        case 'retuneStops':
          return turns && !half.turned ? 1 : 0;
        case 'ruleBreaks':
          return breaks && !half.broken ? 1 : 0;
        case 'secondChoices':
          return step.second;
        case 'capoMoves':
          return step.capo;
        case 'semitones':
          return step.semitones;
        case 'keyChanges':
          return 0;
      }
    }
  }

  private leastCost(half: Half, place: number, kind: number): readonly number[] {
    const toGo = this.bounds!.toGo(place, kind + 1, half.stands, half.turned, half.broken);
    return half.cost.map((cost, index) => cost + toGo[index]!);
  }

  private cannotReach(half: Half, place: number, kind: number, atMost: readonly number[]): boolean {
    return compareLevels(this.leastCost(half, place, kind), atMost) > 0;
  }

  /** The most promising halves, still in lexicographic order. */
  private narrowed(layer: readonly Half[], place: number, kind: number, width: number): readonly Half[] {
    const ranked = layer.map((half, index) => ({ index, least: this.leastCost(half, place, kind) }));
    ranked.sort((a, b) => compareLevels(a.least, b.least) || a.index - b.index);
    const kept = ranked.slice(0, width).sort((a, b) => a.index - b.index);
    return kept.map(({ index }) => layer[index]!);
  }

  private listed(best: Half): readonly (readonly number[])[] {
    const choices: (readonly number[])[] = new Array<readonly number[]>(this.places.length);
    let half: Half | null = best;
    for (let place = this.places.length - 1; place >= 0; place--) {
      choices[place] = half!.stands;
      for (let kind = 0; kind < this.kinds.length; kind++) half = half!.before;
    }
    return choices;
  }
}

const keyOf = (half: Half): string =>
  String.fromCharCode(...half.stands, half.turned ? 1 : 0, half.broken ? 1 : 0);
