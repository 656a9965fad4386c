import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { setTitle, spotAt, type Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { count } from '../../lib/format';
import type { ActionItem } from '../../ui/action-menu';

export interface SetDeeds {
  readonly perform: (label: string, operations: readonly BoardOperation<ShownEntry>[]) => void;
  readonly rename: (setId: string) => void;
}

/** Everything that can be done with a set. Nothing that moves what was called already. */
export function setMenu(
  board: Board<ShownEntry>,
  setIndex: number,
  firstFree: number,
  deeds: SetDeeds,
): readonly (readonly ActionItem[])[] {
  const set = board.sets[setIndex];
  if (!set) return [];
  const title = setTitle(set.title, setIndex);
  const start = board.sets.slice(0, setIndex).reduce((sum, { entries }) => sum + entries.length, 0);
  const fixed = start < firstFree;
  const before = board.sets[setIndex - 1];
  const after = board.sets[setIndex + 1];
  const place = (label: string, moved: string, behind: string | null) =>
    deeds.perform(label, [{ type: 'move-set', setId: moved, after: behind }]);
  return [
    [
      { id: 'rename', label: 'Rename …', onSelect: () => deeds.rename(set.id) },
      {
        id: 'earlier',
        label: 'Move before the set above',
        disabled: !before || start - before.entries.length < firstFree,
        onSelect: () => place(`Moved ${title}`, set.id, board.sets[setIndex - 2]?.id ?? null),
      },
      {
        id: 'later',
        label: 'Move behind the next set',
        disabled: !after || fixed,
        onSelect: () => after && place(`Moved ${title}`, set.id, after.id),
      },
    ],
    [
      {
        id: 'join',
        label: 'Leave out the break before it',
        disabled: !before,
        onSelect: () => {
          if (!before) return;
          const moved = set.entries.map(({ id }, index): BoardOperation<ShownEntry> => ({
            type: 'move-entry',
            entryId: id,
            // Each behind the one before, also where the board changes meanwhile.
            to: {
              setId: before.id,
              after: (index === 0 ? before.entries.at(-1) : set.entries[index - 1])?.id ?? null,
              before: null,
              index: before.entries.length + index,
            },
          }));
          deeds.perform('Left out a break', [...moved, { type: 'remove-set', setId: set.id, entryIds: [] }]);
        },
      },
      {
        id: 'remove',
        label: set.entries.length > 0 ? `Take off with its ${count(set.entries.length, 'tune')}` : 'Take off',
        disabled: fixed && set.entries.length > 0,
        onSelect: () =>
          deeds.perform(`Took off ${title}`, [
            { type: 'remove-set', setId: set.id, entryIds: set.entries.map(({ id }) => id) },
          ]),
      },
    ],
  ];
}

/** Puts a break before an entry: what follows it in its set becomes a set of its own. */
export function splitSet(
  board: Board<ShownEntry>,
  setIndex: number,
  index: number,
  newSetId: string,
): readonly BoardOperation<ShownEntry>[] {
  const set = board.sets[setIndex];
  if (!set) return [];
  return [
    { type: 'add-set', setId: newSetId, title: '', after: set.id },
    ...set.entries.slice(index).map(({ id }, at): BoardOperation<ShownEntry> => ({
      type: 'move-entry',
      entryId: id,
      to: {
        ...spotAt(board, newSetId, 0),
        after: at === 0 ? null : (set.entries[index + at - 1]?.id ?? null),
        index: at,
      },
    })),
  ];
}
