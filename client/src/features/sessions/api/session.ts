import type { AcceptSuggestion } from '@pegwell/shared/contract/ordering';
import type { PutBoard, Session, UpdateSession } from '@pegwell/shared/contract/sessions';
import { api } from '../../../lib/api';

export const sessionKey = (sessionId: string) => ['session', sessionId] as const;

export const getSession = (sessionId: string, signal?: AbortSignal) =>
  api.get<Session>(`/sessions/${sessionId}`, signal ? { signal } : {});

export const putBoard = (sessionId: string, board: PutBoard) =>
  api.put<Session>(`/sessions/${sessionId}/board`, board);

/** What stands beside the board: who retunes, what people arrive tuned to, when and where, the goal. */
export const updateSession = (sessionId: string, changes: UpdateSession) =>
  api.patch<Session>(`/sessions/${sessionId}`, changes);

/** Another code; the old one opens nothing from then on. */
export const changeCode = (sessionId: string) => api.post<Session>(`/sessions/${sessionId}/code`);

/** Takes an order of the board's own entries. */
export const acceptOrder = (sessionId: string, order: AcceptSuggestion) =>
  api.post<Session>(`/sessions/${sessionId}/suggestion/accept`, order);

/** The set sheet as a PDF. */
export const sheetUrl = (sessionId: string, paper: 'a4' | 'letter') =>
  `/api/sessions/${sessionId}/sheet.pdf?paper=${paper}`;
