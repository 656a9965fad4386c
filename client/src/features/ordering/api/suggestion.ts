import type { SessionSuggestion, SessionSuggestionRequest } from '@pegwell/shared/contract/ordering';
import { api } from '../../../lib/api';

/** Asks for a better order of the board as it is saved. Ended by `signal` when nobody waits any more. */
export const askSuggestion = (sessionId: string, body: SessionSuggestionRequest, signal: AbortSignal) =>
  api.post<SessionSuggestion>(`/sessions/${sessionId}/suggestion`, body, { signal });
