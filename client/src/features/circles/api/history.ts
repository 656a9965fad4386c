import type { Happened } from '@pegwell/shared/contract/history';
import type { Page } from '@pegwell/shared/contract/page';
import { api } from '../../../lib/api';

export const historyKey = (circleId: string, page: number) => ['circle', circleId, 'history', page] as const;

export const getHistory = (circleId: string, page: number, signal?: AbortSignal) =>
  api.get<Page<Happened>>(`/circles/${circleId}/history`, { query: { page }, ...(signal ? { signal } : {}) });
