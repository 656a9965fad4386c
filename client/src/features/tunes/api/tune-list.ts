import type { Page } from '@pegwell/shared/contract/page';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { api } from '../../../lib/api';

/** What a list of tunes is asked for, as it stands in the page's address. */
export interface TuneFilters {
  readonly search: string;
  readonly kind: string;
  readonly tuning: string;
  readonly key: string;
  readonly mode: string;
  readonly rhythm: string;
  readonly sort: string;
  readonly page: number;
}

export const TUNES_A_PAGE = 50;

/** Everything of a circle's library; what changes a tune renews all below it. */
export const libraryKey = (circleId: string) => ['tunes', circleId] as const;

export const tuneListKey = (circleId: string, filters: TuneFilters) =>
  [...libraryKey(circleId), 'list', filters] as const;

export const getTunes = (circleId: string, filters: TuneFilters, signal?: AbortSignal) =>
  api.get<Page<Tune>>(`/circles/${circleId}/tunes`, {
    query: { ...filters, pageSize: TUNES_A_PAGE },
    ...(signal ? { signal } : {}),
  });

/** Where a browser fetches the whole library as a file. */
export const exportUrl = (circleId: string, format: 'csv' | 'abc') =>
  `/api/circles/${circleId}/tunes/export?format=${format}`;

/** How many tunes the library holds. */
export async function countTunes(circleId: string, signal?: AbortSignal): Promise<number> {
  const first = await api.get<Page<Tune>>(`/circles/${circleId}/tunes`, {
    query: { pageSize: 1 },
    ...(signal ? { signal } : {}),
  });
  return first.total;
}
