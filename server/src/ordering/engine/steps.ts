/** How often the clock outside is asked. */
const BETWEEN_LOOKS = 2048;

/** Thrown through a search that has used up its steps or its time; caught where the best so far is known. */
export class OutOfSteps extends Error {
  constructor(readonly reason: 'steps' | 'time') {
    super(`Out of ${reason}`);
  }
}

/**
 * What a search may still do. Counting steps keeps answers the same on every machine; the time limit is
 * handed in as a question, because nothing here knows a clock.
 */
export class Steps {
  taken = 0;
  private nextLook = BETWEEN_LOOKS;

  constructor(
    private readonly budget: number,
    private readonly shouldStop: () => boolean,
  ) {}

  /** @throws OutOfSteps */
  take(count: number): void {
    this.taken += count;
    if (this.taken > this.budget) throw new OutOfSteps('steps');
    if (this.taken < this.nextLook) return;
    this.nextLook = this.taken + BETWEEN_LOOKS;
    if (this.shouldStop()) throw new OutOfSteps('time');
  }

  /** Where memory, not time, has run out. */
  end(): never {
    throw new OutOfSteps('steps');
  }

  /** The same count under a nearer end: for a part of the search that must not eat the rest. */
  within(part: number): Steps {
    return new PartOfSteps(this, part);
  }
}

/** Thrown where only a part has used up its share; the search goes on in another way. */
export class OutOfShare extends Error {}

class PartOfSteps extends Steps {
  constructor(
    private readonly whole: Steps,
    private left: number,
  ) {
    super(Infinity, () => false);
  }

  override take(count: number): void {
    this.whole.take(count);
    this.left -= count;
    if (this.left < 0) throw new OutOfShare();
  }
}
