import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { setTitle, spotAt, standingOf, type Board, type Spot } from '@pegwell/shared/session/board';
import type { Price } from '@pegwell/shared/session/insert';
import { count } from '../../lib/format';

type Placed = Omit<Price, 'levels'>;

/** Where a price was found, in the board's own sets: while live, the evening begins with what is now. */
export function placeOnBoard(
  board: Board<ShownEntry>,
  price: Placed,
  nowEntryId: string | null,
): Pick<Price, 'setIndex' | 'index'> {
  const now = nowEntryId === null ? null : standingOf(board, nowEntryId);
  const index = now && price.setIndex === 0 ? price.index + now.index : price.index;
  return { setIndex: price.setIndex + (now?.setIndex ?? 0), index };
}

export function spotOfPrice(board: Board<ShownEntry>, price: Placed, nowEntryId: string | null): Spot | null {
  const { setIndex, index } = placeOnBoard(board, price, nowEntryId);
  const set = board.sets[setIndex];
  return set ? spotAt(board, set.id, index) : null;
}

/** `after 8`, `before 1`, `in Second set` for a set without tunes. */
export function placeWords(board: Board<ShownEntry>, price: Placed, nowEntryId: string | null): string {
  const { setIndex, index } = placeOnBoard(board, price, nowEntryId);
  const set = board.sets[setIndex];
  const before = board.sets.slice(0, setIndex).reduce((sum, { entries }) => sum + entries.length, 0);
  if (!set || set.entries.length === 0) return `in ${setTitle(set?.title ?? '', setIndex)}`;
  return index === 0 ? `before ${before + 1}` : `after ${before + index}`;
}

/** `free, after 8`; `5 pegs, before 1` */
export function priceWords(board: Board<ShownEntry>, price: Placed, nowEntryId: string | null): string {
  const cost = price.pegChanges === 0 ? 'free' : count(price.pegChanges, 'peg');
  return `${cost}, ${placeWords(board, price, nowEntryId)}`;
}
