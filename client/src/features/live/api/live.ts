import type { CirclePlay, LiveState, LiveStep } from '@pegwell/shared/contract/live';
import type { Page } from '@pegwell/shared/contract/page';
import { api } from '../../../lib/api';

export const liveKey = (sessionId: string) => ['live', sessionId] as const;

export const getLive = (sessionId: string, signal?: AbortSignal) =>
  api.get<LiveState>(`/sessions/${sessionId}/live`, signal ? { signal } : {});

export const postStep = (sessionId: string, step: LiveStep) =>
  api.post<LiveState>(`/sessions/${sessionId}/live`, step);

export const playsKey = (circleId: string, page: number) => ['plays', circleId, page] as const;

/** What was played, newest first. */
export const getPlays = (circleId: string, page: number, signal?: AbortSignal) =>
  api.get<Page<CirclePlay>>(`/circles/${circleId}/plays`, {
    query: { page, pageSize: 100 },
    ...(signal ? { signal } : {}),
  });
