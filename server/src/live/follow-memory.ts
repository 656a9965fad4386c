/** An evening as it was read, and until when it may be shown. */
export interface Remembered {
  readonly sessionId: string;
  readonly version: number;
  /** Milliseconds since 1970. */
  readonly goodUntil: number;
}

/** Evenings kept at once; the one asked for longest ago goes first. */
const MOST = 1_000;
/** How often an evening is read again because it changed while it was read. */
const READINGS = 5;

/**
 * What this process remembers of evenings that are followed, by code. A thousand phones that ask every two
 * seconds are answered from here. It keeps nothing while it does not hear of changes, and never gives an
 * answer older than one it has seen or heard of.
 */
export class FollowMemory<T extends Remembered> {
  private hears = false;
  /** Counts the times the line was found or lost: what was read across one may have missed a change. */
  private era = 0;
  private readonly kept = new Map<string, T>();
  private readonly codes = new Map<string, string>();
  /** The newest version that was heard of or read, by session. */
  private readonly newest = new Map<string, number>();
  private readonly reading = new Map<string, Promise<T | null>>();

  constructor(
    private readonly read: (code: string) => Promise<T | null>,
    private readonly now: () => number = Date.now,
  ) {}

  /** Null where the code is unknown or has ended. */
  async find(code: string): Promise<T | null> {
    const found = this.kept.get(code) ?? (await this.readOnce(code));
    return found && found.goodUntil > this.now() ? found : null;
  }

  /** Changes are heard from here on. */
  listens(): void {
    this.hears = true;
    this.era++;
  }

  /** Changes may be missed from here on: whatever is known may be old. */
  lost(): void {
    this.hears = false;
    this.era++;
    this.kept.clear();
    this.codes.clear();
  }

  /** A change of this evening was committed, here or in another process. */
  heard(sessionId: string, version: number): void {
    this.newest.set(sessionId, Math.max(version, this.newest.get(sessionId) ?? 0));
    const code = this.codes.get(sessionId);
    if (code === undefined) return;
    this.kept.delete(code);
    this.codes.delete(sessionId);
  }

  /** Phones that ask at once wait for one reading. */
  private readOnce(code: string): Promise<T | null> {
    const underWay = this.reading.get(code);
    if (underWay) return underWay;
    const reading = this.readNewest(code).finally(() => this.reading.delete(code));
    this.reading.set(code, reading);
    return reading;
  }

  private async readNewest(code: string): Promise<T | null> {
    for (let readings = 0; readings < READINGS; readings++) {
      const { era } = this;
      const found = await this.read(code);
      if (!found) return null;
      const newest = this.newest.get(found.sessionId) ?? 0;
      // It changed while it was read: that reading is old already.
      if (found.version < newest) continue;
      this.newest.set(found.sessionId, found.version);
      if (this.hears && era === this.era) this.keep(code, found);
      return found;
    }
    throw new Error(`an evening was still older than heard of after ${READINGS} readings`);
  }

  private keep(code: string, found: T): void {
    this.kept.set(code, found);
    this.codes.set(found.sessionId, code);
    const [oldest] = this.kept;
    if (this.kept.size <= MOST || !oldest) return;
    this.kept.delete(oldest[0]);
    this.codes.delete(oldest[1].sessionId);
  }
}
