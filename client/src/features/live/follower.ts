import type { Follow } from '@pegwell/shared/contract/live';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import { ProblemError } from '../../lib/problem';
import { askFollow } from './api/follow';
import { keep, readKept, type Kept } from './kept-answers';

/** What is known of an evening, and how fresh it is. */
export interface Heard {
  /** One per kind asked for, in that order; empty until something was heard. */
  readonly follows: readonly Follow[];
  /** When the server was last heard, by this device's clock, in ms; null when never. */
  readonly heardAt: number | null;
  /** Why the last question had no answer; null when it had one. */
  readonly problem: ProblemError | null;
}

/** ms between an answer and the next question. */
export const VISIBLE_MS = 2_000;
const HIDDEN_MS = 15_000;
/** After failures in a row; further ones wait as long as the last. */
const AGAIN_MS: readonly number[] = [2_000, 4_000, 8_000, 15_000];
/** A code that is not known stays so, unless the host has just made it. */
const UNKNOWN_MS = 30_000;
const PATIENCE_MS = 8_000;

/**
 * Asks again and again what an evening shows for some kinds: every two seconds while somebody looks,
 * seldom while nobody does, ever slower while there is no answer. It never shows an older answer after a
 * newer one, and begins with what the device has kept.
 */
export class Follower {
  private readonly answers = new Map<string, Kept>();
  private heard: Heard;
  private failures = 0;
  /** Older answers in a row, from a process that lags behind. */
  private olderInARow = 0;
  private timer: ReturnType<typeof setTimeout> | null = null;
  private asking: AbortController | null = null;
  private stopped = true;

  /** @param kinds by id, or those that retune in the room, whichever they are by then */
  constructor(
    private readonly code: string,
    private readonly kinds: readonly string[] | 'room',
    private readonly onHeard: (heard: Heard) => void,
  ) {
    for (const { id } of BUILT_IN_KINDS) {
      const kept = readKept(code, id);
      if (kept) this.answers.set(id, kept);
    }
    this.heard = { ...this.known(), problem: null };
  }

  current(): Heard {
    return this.heard;
  }

  start(): void {
    this.stopped = false;
    document.addEventListener('visibilitychange', this.lookAgain);
    window.addEventListener('online', this.lookAgain);
    this.askNow();
  }

  stop(): void {
    this.stopped = true;
    document.removeEventListener('visibilitychange', this.lookAgain);
    window.removeEventListener('online', this.lookAgain);
    this.pause();
  }

  /** Without waiting for the next turn: somebody looks again, or has just changed something. */
  askNow(): void {
    if (this.stopped) return;
    this.pause();
    void this.ask();
  }

  private readonly lookAgain = () => {
    if (document.visibilityState === 'visible') this.askNow();
  };

  private pause(): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    this.asking?.abort();
    this.asking = null;
  }

  private async ask(): Promise<void> {
    const asking = new AbortController();
    this.asking = asking;
    const patience = setTimeout(() => asking.abort('slow'), PATIENCE_MS);
    try {
      const kinds = this.asked();
      await this.askFor(kinds, asking.signal);
      // The room's kinds may be known only now, or others than before.
      const more = this.asked().filter((kind) => !kinds.includes(kind));
      await this.askFor(more, asking.signal);
      if (this.asking !== asking) return;
      this.failures = 0;
      this.say(null);
    } catch (error) {
      // Ended by the page, which has begun another question or gone away.
      if (this.asking !== asking) return;
      this.failures++;
      this.say(error instanceof ProblemError ? error : noAnswer());
    } finally {
      clearTimeout(patience);
    }
    if (this.asking !== asking) return;
    this.asking = null;
    this.timer = setTimeout(() => void this.ask(), this.wait());
  }

  /** The kinds to ask for. A room of which nothing is known, or in which nobody retunes, is a fiddle's. */
  private asked(): readonly string[] {
    if (this.kinds !== 'room') return this.kinds;
    const [newest] = [...this.answers.values()].sort((a, b) => b.follow.version - a.follow.version);
    const inRoom = newest?.follow.kinds ?? [];
    return inRoom.length > 0 ? inRoom : ['fiddle'];
  }

  private async askFor(kinds: readonly string[], signal: AbortSignal): Promise<void> {
    await Promise.all(kinds.map((kind) => this.askForKind(kind, signal)));
  }

  private async askForKind(kind: string, signal: AbortSignal): Promise<void> {
    const known = this.answers.get(kind);
    const answer = await askFollow(this.code, kind, known?.etag ?? null, signal);
    const heardAt = Date.now();
    if (answer === null) {
      if (known) this.answers.set(kind, { ...known, heardAt });
      return;
    }
    const older = known !== undefined && answer.follow.version < known.follow.version;
    this.olderInARow = older ? this.olderInARow + 1 : 0;
    // One older answer is a server that has not heard yet; if it stays so, the database was set back.
    if (older && this.olderInARow < 3) return;
    this.answers.set(kind, { ...answer, heardAt });
    keep(this.code, kind, { ...answer, heardAt });
  }

  private known(): Pick<Heard, 'follows' | 'heardAt'> {
    const kinds = this.asked();
    const kept = kinds.flatMap((kind) => this.answers.get(kind) ?? []);
    if (kept.length < kinds.length || kept.length === 0) return { follows: [], heardAt: null };
    return {
      follows: kept.map(({ follow }) => follow),
      heardAt: Math.min(...kept.map(({ heardAt }) => heardAt)),
    };
  }

  private say(problem: ProblemError | null): void {
    this.heard = { ...this.known(), problem };
    this.onHeard(this.heard);
  }

  private wait(): number {
    if (this.heard.problem?.status === 404) return UNKNOWN_MS;
    const again = AGAIN_MS[Math.min(this.failures, AGAIN_MS.length) - 1];
    const over = this.heard.follows.some(({ status }) => status === 'finished');
    const usual = document.visibilityState === 'visible' && !over ? VISIBLE_MS : HIDDEN_MS;
    return again === undefined ? usual : Math.max(again, usual);
  }
}

function noAnswer(): ProblemError {
  return new ProblemError({ status: 0, code: 'offline', detail: 'The server does not answer.' });
}
