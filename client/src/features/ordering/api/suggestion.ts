import type { HeldBack, HeldBackRequest } from '@pegwell/shared/contract/explain';
import type { SessionSuggestion, SessionSuggestionRequest } from '@pegwell/shared/contract/ordering';
import { api } from '../../../lib/api';

/** Asks for a better order of the board as it is saved. Ended by `signal` when nobody waits any more. */
export const askSuggestion = (sessionId: string, body: SessionSuggestionRequest, signal: AbortSignal) =>
  api.post<SessionSuggestion>(`/sessions/${sessionId}/suggestion`, body, { signal });

/** Asks what an order would gain without each rule and each tune: a few seconds. */
export const askHeldBack = (sessionId: string, body: HeldBackRequest, signal: AbortSignal) =>
  api.post<HeldBack>(`/sessions/${sessionId}/suggestion/held-back`, body, { signal });
