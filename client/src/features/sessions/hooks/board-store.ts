import type { AcceptSuggestion } from '@pegwell/shared/contract/ordering';
import type { PutBoard, Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Board } from '@pegwell/shared/session/board';
import { boardBody } from '@pegwell/shared/session/board-body';
import { inverseOfAll } from '@pegwell/shared/session/board-inverse';
import { applyOperations, type BoardOperation } from '@pegwell/shared/session/board-operations';
import { ProblemError, sentenceOf } from '../../../lib/problem';
import { boardOf, calledThatMoves, sameToSave, type BoardState, type Saving } from './board-state';
import type { BoardAction, PendingStorage } from './pending-storage';
import { lostSentences, withoutRefused } from './refusals';

export interface BoardPorts {
  readonly put: (board: PutBoard) => Promise<Session>;
  readonly accept: (order: AcceptSuggestion) => Promise<Session>;
  readonly storage: PendingStorage;
  /** A new id (a UUID). */
  readonly newId: () => string;
}

type Operations = readonly BoardOperation<ShownEntry>[];

/** Milliseconds from the first change to its save. */
const PAUSE = 400;
/** Milliseconds until a save that found nobody is tried again: doubled each time, up to the last. */
const RETRY_FIRST = 1_000;
const RETRY_LAST = 30_000;
const UNDO_DEPTH = 200;

/**
 * A board in the hand of one host. What is on screen is the server's board with the actions that are not
 * saved yet applied to it, by entry id; so a newer board from the server, another host's, can be taken in at
 * any time without losing them. One save is on its way at a time. A save whose answer was lost is sent again
 * as it was: the server knows the same board again.
 */
export class BoardStore {
  private base: Session;
  private pending: readonly BoardAction[];
  /** How many of `pending` are in the save that is on its way, or whose answer was lost. */
  private sent = 0;
  private busy: Promise<void> | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private wait = RETRY_FIRST;
  private back: readonly { readonly label: string; readonly operations: Operations }[] = [];
  private forth: typeof this.back = [];
  private state: BoardState;
  private readonly listeners = new Set<() => void>();

  constructor(
    session: Session,
    private readonly ports: BoardPorts,
  ) {
    this.base = session;
    this.pending = ports.storage.load();
    const { board } = applyOperations(boardOf(session), this.operations());
    this.state = {
      ...{ session, board, saving: 'saved', waiting: this.pending.length },
      ...{ takenIn: null, problems: [], undo: null, redo: null },
    };
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly getState = (): BoardState => this.state;

  /**
   * Does something to the board, and remembers how to take it back.
   * @returns false where it changes nothing or cannot be; then a sentence says why
   */
  readonly perform = (label: string, operations: Operations): boolean => {
    const back = this.push(label, operations);
    if (!back) return false;
    this.back = [...this.back, { label, operations: back }].slice(-UNDO_DEPTH);
    this.forth = [];
    this.show();
    return true;
  };

  readonly undo = (): string | null => {
    const last = this.back.at(-1);
    if (!last) return null;
    this.back = this.back.slice(0, -1);
    const again = this.push(`Undid: ${last.label}`, last.operations);
    if (again) this.forth = [...this.forth, { label: last.label, operations: again }];
    this.show(again ? {} : { problems: [`“${last.label}” could not be undone: what it changed is gone.`] });
    return again && last.label;
  };

  readonly redo = (): string | null => {
    const next = this.forth.at(-1);
    if (!next) return null;
    this.forth = this.forth.slice(0, -1);
    const back = this.push(next.label, next.operations);
    if (back) this.back = [...this.back, { label: next.label, operations: back }];
    this.show(
      back ? {} : { problems: [`“${next.label}” could not be done again: what it changed is gone.`] },
    );
    return back && next.label;
  };

  readonly dismissProblems = (): void => this.show({ problems: [] });

  /** The session as it was read or changed beside the board. Older ones are left aside. */
  readonly receive = (session: Session): void => {
    const newer = session.version > this.base.version;
    if (session.version < this.base.version) return;
    // While a save has no answer its own board may be what came in: the answer decides.
    if (newer && this.sent > 0) return;
    if (newer) this.takeIn(session);
    else {
      this.base = session;
      this.show();
    }
  };

  /** Saves what is not saved yet, now. @returns whether everything is saved */
  readonly flush = async (): Promise<boolean> => {
    clearTimeout(this.timer);
    await (this.busy ??= this.save().finally(() => (this.busy = null)));
    return this.pending.length === 0;
  };

  /** The page is there, looked at again, or the connection is back: no need to wait for the next try. */
  readonly wake = (): void => {
    this.wait = RETRY_FIRST;
    if (this.pending.length > 0) void this.flush();
  };

  /**
   * Takes an order that was suggested for the board as it is saved now. It can be taken back like anything
   * else. @throws ProblemError where the server does not take it; a newer board is taken in first.
   */
  readonly accept = async (label: string, order: AcceptSuggestion): Promise<void> => {
    const before = this.state.board;
    try {
      const session = await this.ports.accept(order);
      const back: Operations = [
        {
          type: 'replace-order',
          sets: before.sets.map(({ id, entries }) => ({
            setId: id,
            entryIds: entries.map((each) => each.id),
          })),
        },
      ];
      this.back = [...this.back, { label, operations: back }];
      this.forth = [];
      this.base = session;
      this.show();
    } catch (error) {
      const current = currentOf(error);
      if (current) this.takeIn(current);
      throw error;
    }
  };

  private operations(actions = this.pending): Operations {
    return actions.flatMap((action) => action.operations);
  }

  /** @returns how to take it back; null where nothing came of it */
  private push(label: string, operations: Operations): Operations | null {
    const before = this.state.board;
    const { board, skipped } = applyOperations(before, operations);
    if (sameToSave(before, board)) return null;
    const called = calledThatMoves(this.base, before, board);
    if (called !== null) {
      this.show({ problems: [`Number ${called} was called already and stays at its place.`] });
      return null;
    }
    const done = operations.filter((operation) => !skipped.includes(operation));
    this.pending = [...this.pending, { id: this.ports.newId(), label, operations: done }];
    this.ports.storage.keep(this.pending, []);
    this.show({ problems: [], ...(this.state.saving === 'offline' ? {} : { saving: 'waiting' as const }) });
    if (this.state.saving !== 'offline') this.saveSoon();
    return inverseOfAll(before, done);
  }

  private saveSoon(ms = PAUSE): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), ms);
  }

  /** Sends until nothing is left to send, or nobody answers. */
  private async save(): Promise<void> {
    let conflicts = 0;
    while (this.pending.length > 0) {
      if (this.sent === 0) this.sent = this.pending.length;
      const sending = this.pending.slice(0, this.sent);
      const { board } = applyOperations(boardOf(this.base), this.operations(sending));
      this.show({ saving: this.state.saving === 'offline' ? 'offline' : 'saving' });
      try {
        const session = await this.ports.put(boardBody(board, this.base.version));
        this.base = session;
        this.forget(sending);
        this.wait = RETRY_FIRST;
        this.show({ saving: this.pending.length > 0 ? 'waiting' : 'saved' });
      } catch (error) {
        conflicts += 1;
        if (!this.recover(error, board, sending)) return;
        // Somebody saves as fast as we do: give way for a moment.
        if (conflicts > 3) await new Promise((go) => setTimeout(go, 100 * conflicts));
      }
    }
    this.show({ saving: 'saved' });
  }

  /** @returns whether to send again at once */
  private recover(error: unknown, board: Board<ShownEntry>, sending: readonly BoardAction[]): boolean {
    const status = error instanceof ProblemError ? error.status : 0;
    const current = currentOf(error);
    if (current) {
      this.sent = 0;
      this.takeIn(current);
      return this.pending.length > 0;
    }
    if (status === 400 || status === 422) {
      const { kept, sentences } = withoutRefused(error as ProblemError, board, sending);
      const left = new Set(kept.map(({ id }) => id));
      this.forget(sending.filter(({ id }) => !left.has(id)));
      this.sent = 0;
      this.show({ problems: [...this.state.problems, ...sentences] });
      return true;
    }
    if (status === 401 || status === 403 || status === 404 || status === 413) {
      this.sent = 0;
      this.show({ saving: 'refused', problems: [sentenceOf(error)] });
      return false;
    }
    // Nobody there, or a server that fails: what was sent may have been saved, so it is sent again as it was.
    this.show({ saving: 'offline' });
    this.saveSoon(this.wait);
    this.wait = Math.min(this.wait * 2, RETRY_LAST);
    return false;
  }

  private takeIn(session: Session): void {
    const { skipped } = applyOperations(boardOf(session), this.operations());
    const lost = lostSentences(skipped, this.state.board);
    this.base = session;
    this.show({
      takenIn: { who: session.updatedBy ?? 'Somebody', version: session.version },
      problems: [...new Set([...this.state.problems, ...lost])],
    });
  }

  private forget(actions: readonly BoardAction[]): void {
    const ids = actions.map(({ id }) => id);
    this.pending = this.pending.filter(({ id }) => !ids.includes(id));
    this.sent = 0;
    this.ports.storage.keep(this.pending, ids);
  }

  private show(more: Partial<BoardState> = {}): void {
    const { board } = applyOperations(boardOf(this.base), this.operations());
    const saving: Saving = more.saving ?? this.state.saving;
    this.state = {
      ...this.state,
      ...more,
      session: this.base,
      board,
      saving,
      waiting: this.pending.length,
      undo: this.back.at(-1)?.label ?? null,
      redo: this.forth.at(-1)?.label ?? null,
    };
    for (const listener of this.listeners) listener();
  }
}

/** The session that a 409 carries. */
function currentOf(error: unknown): Session | null {
  if (!(error instanceof ProblemError) || error.status !== 409) return null;
  const { body } = error;
  const current = typeof body === 'object' && body !== null && 'current' in body ? body.current : null;
  return current ? (current as Session) : null;
}
