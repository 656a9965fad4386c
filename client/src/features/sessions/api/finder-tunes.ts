import type { Page } from '@pegwell/shared/contract/page';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { api } from '../../../lib/api';

/** What a host looks for; empty fields filter nothing. */
export interface FinderQuery {
  readonly search: string;
  readonly key: string;
  readonly kind: string;
  readonly tuning: string;
}

export const FINDER_PAGE = 30;

export const finderKey = (circleId: string, query: FinderQuery) =>
  ['circle', circleId, 'tunes', 'finder', query] as const;

export const findTunes = (circleId: string, query: FinderQuery, page: number, signal: AbortSignal) =>
  api.get<Page<Tune>>(`/circles/${circleId}/tunes`, {
    // The server compares a tuning only where a kind is said with it.
    query: {
      ...query,
      kind: query.tuning ? query.kind : '',
      page,
      pageSize: FINDER_PAGE,
    },
    signal,
  });
