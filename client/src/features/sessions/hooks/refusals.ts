import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import type { ProblemError } from '../../../lib/problem';
import { entryTitle } from '../../../music/entry-title';
import { entryOf, setOf, titleOf } from './board-state';
import type { BoardAction } from './pending-storage';

/**
 * What is left of the actions after the server has refused the board: those that touch what its errors name
 * are left out; where it names nothing of ours, the last one is. At least one goes, so sending ends.
 * @param board as it was sent, in which the errors' paths are places
 */
export function withoutRefused(
  problem: ProblemError,
  board: Board<ShownEntry>,
  sent: readonly BoardAction[],
): { readonly kept: readonly BoardAction[]; readonly sentences: readonly string[] } {
  const named = problem.errors.map(({ path }) => placeOf(path, board));
  const entries = new Set(named.flatMap((place) => (place?.entryId ? [place.entryId] : [])));
  const sets = new Set(named.flatMap((place) => (place && !place.entryId ? [place.setId] : [])));
  const touches = ({ operations }: BoardAction) =>
    operations.some((each) => {
      const entryId = entryOf(each);
      return entryId === null ? sets.has(setOf(each) ?? '') : entries.has(entryId);
    });
  const guilty = sent.filter(touches);
  const dropped = guilty.length > 0 ? guilty : sent.slice(-1);
  const reasons = problem.errors.length > 0 ? problem.errors.map(({ message }) => message) : [problem.detail];
  const what = dropped.map(({ label }) => `“${label}”`).join(', ');
  return {
    kept: sent.filter((action) => !dropped.includes(action)),
    sentences: [`${[...new Set(reasons)].join(' ')} Left out: ${what}.`],
  };
}

/** `sets.0.entries.3.tuneId` is the fourth entry of the first set. */
function placeOf(path: string, board: Board<ShownEntry>): { setId: string; entryId: string | null } | null {
  const match = /^sets\.(\d+)(?:\.entries\.(\d+))?/.exec(path);
  const set = match && board.sets[Number(match[1])];
  if (!set) return null;
  const entry = match[2] === undefined ? undefined : set.entries[Number(match[2])];
  return { setId: set.id, entryId: entry?.id ?? null };
}

/** What could not be done any more on a newer board, one sentence a tune. */
export function lostSentences(
  skipped: readonly BoardOperation<ShownEntry>[],
  board: Board<ShownEntry>,
): readonly string[] {
  const sentences = skipped.map((operation) => {
    if (operation.type === 'add-entry') return `${entryTitle(operation.entry)} could not be added.`;
    if (operation.type === 'set-rule') return 'A tune was taken out meanwhile, and its rule is left out.';
    const entryId = entryOf(operation);
    const title = entryId && titleOf(board, entryId);
    if (title) return `${title} was taken out meanwhile; what you did to it is left out.`;
    return 'A set was taken off meanwhile; what you did to it is left out.';
  });
  return [...new Set(sentences)];
}
