import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Board } from '@pegwell/shared/session/board';
import { eveningOfBoard } from '@pegwell/shared/session/board-evening';
import type { Evening, Scored } from '@pegwell/shared/session/evening';
import { scoreEvening } from '@pegwell/shared/session/score';
import { useMemo } from 'react';

export interface ScoredBoard extends Scored {
  readonly evening: Evening;
}

export function scoreBoard(session: Session, board: Board<ShownEntry>): ScoredBoard {
  const evening = eveningOfBoard(session, board);
  return { evening, ...scoreEvening(evening) };
}

/** What the board costs as it is on screen: reckoned here, a millisecond or two, on every move of a card. */
export function useScored(session: Session, board: Board<ShownEntry>): ScoredBoard {
  return useMemo(() => scoreBoard(session, board), [session, board]);
}
