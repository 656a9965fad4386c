import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { setTitle, spotAt, standingOf, type Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { builtInKind } from '@pegwell/shared/music/instrument';
import type { ActionItem } from '../../ui/action-menu';
import { newId } from '../../lib/new-id';
import { entryTitle } from '../../music/entry-title';
import { ruleMenu } from './rules';
import { splitSet } from './set-menu';

export interface CardDeeds {
  readonly perform: (label: string, operations: readonly BoardOperation<ShownEntry>[]) => void;
  readonly askPosition: (entry: ShownEntry) => void;
  readonly askBefore: (entry: ShownEntry) => void;
  readonly editOpenPlace: (entry: ShownEntry) => void;
}

/** The place `position` of the evening, from 0, for an entry that is taken out first. */
export function moveToPosition(
  board: Board<ShownEntry>,
  entryId: string,
  position: number,
): BoardOperation<ShownEntry> | null {
  let rest = Math.max(0, position);
  for (const [setIndex, set] of board.sets.entries()) {
    const size = set.entries.filter(({ id }) => id !== entryId).length;
    // A place at the end of a set is taken there, not at the head of the next: it grows where it is.
    const own = set.entries.length > size;
    const last = setIndex === board.sets.length - 1;
    if (rest < size || (rest === size && (own || last))) {
      return { type: 'move-entry', entryId, to: spotAt(board, set.id, rest, entryId) };
    }
    rest -= size;
  }
  const set = board.sets.at(-1);
  return set ? { type: 'move-entry', entryId, to: spotAt(board, set.id, set.entries.length, entryId) } : null;
}

/**
 * Everything that can be done with a card, by menu: what dragging does, and what it does not.
 * @param firstFree the first place of the evening, from 0, that may still change; what was called keeps its own
 */
export function cardMenu(
  session: Session,
  board: Board<ShownEntry>,
  entry: ShownEntry,
  firstFree: number,
  deeds: CardDeeds,
): readonly (readonly ActionItem[])[] {
  const standing = standingOf(board, entry.id);
  if (!standing) return [];
  const { set, setIndex, index, position } = standing;
  const title = entryTitle(entry);
  const isCalled = position < firstFree;
  const move = (label: string, setId: string, at: number) =>
    deeds.perform(label, [{ type: 'move-entry', entryId: entry.id, to: spotAt(board, setId, at, entry.id) }]);
  const before = board.sets[setIndex - 1];
  const after = board.sets[setIndex + 1];
  const start = position - index;

  const moves: ActionItem[] = [
    {
      id: 'up',
      label:
        index === 0 && before ? `Move up, to the end of ${setTitle(before.title, setIndex - 1)}` : 'Move up',
      disabled: position <= firstFree && (index > 0 || !before || start < firstFree),
      onSelect: () =>
        index > 0
          ? move(`Moved ${title} up`, set.id, index - 1)
          : before && move(`Moved ${title} up`, before.id, before.entries.length),
    },
    {
      id: 'down',
      label:
        index === set.entries.length - 1 && after
          ? `Move down, to the head of ${setTitle(after.title, setIndex + 1)}`
          : 'Move down',
      disabled: index === set.entries.length - 1 && !after,
      onSelect: () =>
        index < set.entries.length - 1
          ? move(`Moved ${title} down`, set.id, index + 1)
          : after && move(`Moved ${title} down`, after.id, 0),
    },
    { id: 'position', label: 'Move to a place …', onSelect: () => deeds.askPosition(entry) },
    ...board.sets.flatMap((other, otherIndex): ActionItem[] => {
      const behind = board.sets.slice(0, otherIndex + 1).reduce((sum, each) => sum + each.entries.length, 0);
      if (other.id === set.id || behind < firstFree) return [];
      return [
        {
          id: `to ${other.id}`,
          label: `Move to the end of ${setTitle(other.title, otherIndex)}`,
          onSelect: () => move(`Moved ${title}`, other.id, other.entries.length),
        },
      ];
    }),
  ];

  if (index > 0) {
    moves.push({
      id: 'break',
      label: 'Put a break before it',
      onSelect: () => deeds.perform('Put in a break', splitSet(board, setIndex, index, newId())),
    });
  }

  const flags: ActionItem[] = [
    {
      id: 'pin',
      label: entry.pinned ? 'Unpin' : 'Pin to this place',
      onSelect: () =>
        deeds.perform(`${entry.pinned ? 'Unpinned' : 'Pinned'} ${title}`, [
          { type: 'set-pinned', entryId: entry.id, pinned: !entry.pinned },
        ]),
    },
    ...session.chairs.flatMap(({ kind: kindId, count }): ActionItem[] => {
      const kind = builtInKind(kindId);
      if (!kind || count === 0) return [];
      const out = !entry.sitOut.includes(kindId);
      const who = kind.plural.toLowerCase();
      return [
        {
          id: `sit out ${kindId}`,
          label: out ? `Let the ${who} sit out` : `Let the ${who} play again`,
          onSelect: () =>
            deeds.perform(out ? `The ${who} sit out ${title}` : `The ${who} play ${title}`, [
              { type: 'set-sit-out', entryId: entry.id, kind: kindId, out },
            ]),
        },
      ];
    }),
  ];

  const rules = ruleMenu(board, entry, set.entries[index - 1], deeds);
  const last: ActionItem[] = [
    ...(entry.open
      ? [{ id: 'edit', label: 'Change the open place …', onSelect: () => deeds.editOpenPlace(entry) }]
      : []),
    {
      id: 'remove',
      label: 'Take out',
      onSelect: () => deeds.perform(`Took out ${title}`, [{ type: 'remove-entry', entryId: entry.id }]),
    },
  ];
  return isCalled ? [flags.slice(0, 1)] : [moves, flags, rules, last];
}
