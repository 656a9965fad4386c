import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, type Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { ProblemError } from '../../lib/problem';
import { entryTitle } from '../../music/entry-title';

/** One of the host's rules that cannot all hold. */
export interface Clash {
  readonly rule: 'pin' | 'medley' | 'before';
  readonly ids: readonly string[];
}

/** The rules that a refusal names; null where it was refused for something else. */
export function clashesOf(error: unknown): readonly Clash[] | null {
  if (!(error instanceof ProblemError) || error.code !== 'rules-clash') return null;
  const { body } = error;
  const clashes = typeof body === 'object' && body !== null && 'clashes' in body ? body.clashes : null;
  return Array.isArray(clashes) ? (clashes as readonly Clash[]) : [];
}

/** What a host can do about a rule: said, and done. */
export interface WayOut {
  readonly rule: string;
  /** On the button: "Unpin". */
  readonly does: string;
  /** What was done: "Unpinned Slack Tide". */
  readonly done: string;
  readonly operation: BoardOperation<ShownEntry>;
}

/** Null for a tune that was called: its place is a fact. */
export function wayOut(session: Session, board: Board<ShownEntry>, { rule, ids }: Clash): WayOut | null {
  const entries = entriesOf(board);
  const title = (id: string | undefined): string => {
    const entry = entries.find((each) => each.id === id);
    return entry ? entryTitle(entry) : 'A tune that is gone';
  };
  if (rule === 'pin') {
    const id = ids[0] ?? '';
    if (!entries.some((entry) => entry.id === id && entry.pinned)) return null;
    const number = entries.findIndex((entry) => entry.id === id) + 1;
    return {
      rule: `Pinned to place ${number}`,
      does: 'Unpin',
      done: `Unpinned ${title(id)}`,
      operation: { type: 'set-pinned', entryId: id, pinned: false },
    };
  }
  if (rule === 'medley') {
    return {
      rule: 'One medley, played in this order',
      does: 'No medley',
      done: `${title(ids[0])} begins no medley any more`,
      operation: { type: 'set-rule', rule, ids, holds: false },
    };
  }
  return {
    rule: 'Must be played in this order',
    does: 'In any order',
    done: `${title(ids[0])} may come after ${title(ids[1])}`,
    operation: { type: 'set-rule', rule, ids, holds: false },
  };
}
