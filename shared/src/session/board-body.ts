import type { PutBoard } from '../contract/sessions';
import { entriesOf, type Board } from './board';

/** The board as it is saved: whole, with every id, against the version it was made from. */
export function boardBody(board: Board, version: number): PutBoard {
  const here = new Set(entriesOf(board).map(({ id }) => id));
  return {
    version,
    sets: board.sets.map(({ id, title, entries }) => ({
      id,
      ...(title ? { title } : {}),
      entries: entries.map(({ id: entryId, tuneId, settingId, open, pinned, sitOut }) => ({
        id: entryId,
        tuneId,
        settingId,
        open,
        pinned,
        sitOut: [...sitOut],
      })),
    })),
    medleys: board.medleys.map((ids) => ids.filter((id) => here.has(id))).filter((ids) => ids.length > 1),
    befores: board.befores
      .filter((pair) => pair.every((id) => here.has(id)))
      .map(([first, second]) => [first, second]),
  };
}
