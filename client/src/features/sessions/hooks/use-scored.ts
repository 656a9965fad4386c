import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import type { Board } from '@pegwell/shared/session/board';
import { eveningOfBoard } from '@pegwell/shared/session/board-evening';
import type { Chair, Evening, Scored } from '@pegwell/shared/session/evening';
import { scoreEvening } from '@pegwell/shared/session/score';
import { useMemo } from 'react';

export interface ScoredBoard extends Scored {
  readonly evening: Evening;
}

/** Kinds as people name them, the fiddles first; the score does not mind their order. */
const rankOf = ({ kind }: Chair) => BUILT_IN_KINDS.findIndex(({ id }) => id === kind.id);

export function scoreBoard(session: Session, board: Board<ShownEntry>): ScoredBoard {
  const plain = eveningOfBoard(session, board);
  const evening = { ...plain, chairs: [...plain.chairs].sort((a, b) => rankOf(a) - rankOf(b)) };
  return { evening, ...scoreEvening(evening) };
}

/** What the board costs as it is on screen: reckoned here, a millisecond or two, on every move of a card. */
export function useScored(session: Session, board: Board<ShownEntry>): ScoredBoard {
  return useMemo(() => scoreBoard(session, board), [session, board]);
}
