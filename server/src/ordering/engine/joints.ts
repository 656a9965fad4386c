import type { Compiled } from './compiled';

/** How fine a search looks: at tunings alone, or at tunings and capos. */
export type Grain = 'tuning' | 'stance';

/**
 * How all kinds stand together, numbered as met. What each kind has is its tuning or its stance, by grain.
 */
export class Joints {
  readonly stands: number[][] = [];
  private readonly known = new Map<string, number>();

  constructor(
    readonly compiled: Compiled,
    readonly grain: Grain,
  ) {}

  get opening(): number {
    const { kinds } = this.compiled;
    return this.of(
      kinds.map(({ opening, tuningOf }) => (this.grain === 'tuning' ? tuningOf[opening]! : opening)),
    );
  }

  of(stands: number[]): number {
    const key = String.fromCharCode(...stands);
    let joint = this.known.get(key);
    if (joint === undefined) {
      joint = this.stands.push(stands) - 1;
      this.known.set(key, joint);
    }
    return joint;
  }

  tuning(kind: number, stand: number): number {
    return this.grain === 'tuning' ? stand : this.compiled.kinds[kind]!.tuningOf[stand]!;
  }

  capo(kind: number, stand: number): number {
    return this.grain === 'tuning' ? 0 : this.compiled.kinds[kind]!.capoOf[stand]!;
  }
}
