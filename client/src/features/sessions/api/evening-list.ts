import type { Page } from '@pegwell/shared/contract/page';
import type { CreateSession, Session, SessionSummary } from '@pegwell/shared/contract/sessions';
import { api } from '../../../lib/api';

export const EVENINGS_A_PAGE = 50;

export const eveningsKey = (circleId: string) => ['evenings', circleId] as const;

/** Latest first: the coming ones stand on the first page. */
export const getEvenings = (circleId: string, page: number, signal?: AbortSignal) =>
  api.get<Page<SessionSummary>>(`/circles/${circleId}/sessions`, {
    query: { page, pageSize: EVENINGS_A_PAGE },
    ...(signal ? { signal } : {}),
  });

export const createEvening = (circleId: string, evening: CreateSession) =>
  api.post<Session>(`/circles/${circleId}/sessions`, evening);
