import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, type Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { entryTitle } from '../../music/entry-title';
import type { ActionItem } from '../../ui/action-menu';

type Operations = readonly BoardOperation<ShownEntry>[];

/** By entry id, what the rules between tunes ask of it: `medley with Slack Tide`, `before Grey Owl`. */
export function ruleWords(board: Board<ShownEntry>): ReadonlyMap<string, readonly string[]> {
  const titles = new Map(entriesOf(board).map((entry) => [entry.id, entryTitle(entry)]));
  const words = new Map<string, string[]>();
  const say = (id: string, what: string, other: string) => {
    const title = titles.get(other);
    if (title) words.set(id, [...(words.get(id) ?? []), `${what} ${title}`]);
  };
  for (const medley of board.medleys) {
    for (const [at, id] of medley.entries()) {
      const previous = medley[at - 1];
      if (previous !== undefined) say(id, 'medley with', previous);
    }
  }
  for (const [first, second] of board.befores) say(first, 'before', second);
  return words;
}

interface RuleDeeds {
  readonly perform: (label: string, operations: Operations) => void;
  readonly askBefore: (entry: ShownEntry) => void;
}

/**
 * What a card's menu does about rules between tunes.
 * @param above the entry that stands before it in its set
 */
export function ruleMenu(
  board: Board<ShownEntry>,
  entry: ShownEntry,
  above: ShownEntry | undefined,
  { perform, askBefore }: RuleDeeds,
): readonly ActionItem[] {
  const title = entryTitle(entry);
  const items: ActionItem[] = [];
  const medley = above && withAbove(board, above.id, entry.id);
  if (above && medley) {
    const other = entryTitle(above);
    items.push({
      id: 'medley',
      label: medley.together ? `No medley with ${other}` : `Medley with ${other}`,
      onSelect: () =>
        perform(
          medley.together ? `${title} is no medley with ${other}` : `${other} and ${title} are a medley`,
          medley.operations,
        ),
    });
  }
  items.push({ id: 'before', label: 'Must come before …', onSelect: () => askBefore(entry) });
  for (const [first, second] of board.befores) {
    const other = entriesOf(board).find(({ id }) => id === second);
    if (first !== entry.id || !other) continue;
    items.push({
      id: `before ${second}`,
      label: `Need not come before ${entryTitle(other)}`,
      onSelect: () =>
        perform(`${title} may come after ${entryTitle(other)}`, [
          { type: 'set-rule', rule: 'before', ids: [first, second], holds: false },
        ]),
    });
  }
  return items;
}

/** Makes one medley of what ends above and what begins here, or parts it there; null where neither can be. */
function withAbove(
  board: Board<ShownEntry>,
  above: string,
  here: string,
): { readonly together: boolean; readonly operations: Operations } | null {
  const medleyOf = (id: string) => board.medleys.find((ids) => ids.includes(id));
  const rule = (ids: readonly string[], holds: boolean): Operations =>
    ids.length > 1 ? [{ type: 'set-rule', rule: 'medley', ids, holds }] : [];
  const [upper, lower] = [medleyOf(above) ?? [above], medleyOf(here) ?? [here]];
  const at = upper.indexOf(here);
  if (at > 0 && upper[at - 1] === above) {
    const parts = [upper.slice(0, at), upper.slice(at)];
    return {
      together: true,
      operations: [...rule(upper, false), ...parts.flatMap((ids) => rule(ids, true))],
    };
  }
  if (at >= 0 || upper.at(-1) !== above || lower[0] !== here) return null;
  return {
    together: false,
    operations: [...rule(upper, false), ...rule(lower, false), ...rule([...upper, ...lower], true)],
  };
}
