import type { Session } from '@pegwell/shared/contract/sessions';
import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { newId } from '../../../lib/new-id';
import { acceptOrder, putBoard, sessionKey } from '../api/session';
import type { BoardState } from './board-state';
import { BoardStore } from './board-store';
import { browserStorage } from './pending-storage';

export interface BoardInHand extends BoardState {
  readonly perform: BoardStore['perform'];
  readonly takeBack: BoardStore['undo'];
  readonly doAgain: BoardStore['redo'];
  readonly flush: BoardStore['flush'];
  readonly accept: BoardStore['accept'];
  readonly receive: BoardStore['receive'];
  readonly dismissProblems: BoardStore['dismissProblems'];
}

/**
 * The board of an evening: saves itself, keeps what is not saved over a reload, takes in what others do.
 * The caller shows it under a key of the session's id.
 * @param session as it was read last; newer readings are taken in
 */
export function useBoard(session: Session, accountId: string): BoardInHand {
  const queries = useQueryClient();
  const [store] = useState(() => {
    const remember = (saved: Session) => {
      queries.setQueryData(sessionKey(saved.id), saved);
      return saved;
    };
    return new BoardStore(session, {
      put: async (board) => remember(await putBoard(session.id, board)),
      accept: async (order) => remember(await acceptOrder(session.id, order)),
      storage: browserStorage(accountId, session.id),
      newId,
    });
  });
  const state = useSyncExternalStore(store.subscribe, store.getState);

  useEffect(() => store.receive(session), [store, session]);

  useEffect(() => {
    // A page that is put away may not come back: save at once. One that is looked at again need not wait.
    const wake = () => store.wake();
    wake();
    window.addEventListener('online', wake);
    document.addEventListener('visibilitychange', wake);
    return () => {
      window.removeEventListener('online', wake);
      document.removeEventListener('visibilitychange', wake);
      void store.flush();
    };
  }, [store]);

  return {
    ...state,
    perform: store.perform,
    takeBack: store.undo,
    doAgain: store.redo,
    flush: store.flush,
    accept: store.accept,
    receive: store.receive,
    dismissProblems: store.dismissProblems,
  };
}
