import type { Page } from '@pegwell/shared/contract/page';
import type { PricedTunePage } from '@pegwell/shared/contract/prices';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { api } from '../../../lib/api';

/** What a host looks for; empty fields filter nothing. */
export interface FinderQuery {
  readonly search: string;
  readonly key: string;
  readonly kind: string;
  readonly tuning: string;
}

/** By title, or as the evening stands: what costs least comes first. */
export type FinderSort = 'title' | 'price';

/** Whose tunes, and for which evening. */
export interface FinderPlace {
  readonly circleId: string;
  readonly sessionId: string;
}

export const FINDER_PAGE = 30;

export const finderKey = ({ circleId, sessionId }: FinderPlace, query: FinderQuery, sort: FinderSort) =>
  ['circle', circleId, 'tunes', 'finder', query, ...(sort === 'price' ? [sessionId] : [])] as const;

export async function findTunes(
  { circleId, sessionId }: FinderPlace,
  query: FinderQuery,
  sort: FinderSort,
  page: number,
  signal: AbortSignal,
): Promise<Page<Tune>> {
  const asked = {
    // The server compares a tuning only where a kind is said with it.
    query: { ...query, kind: query.tuning ? query.kind : '', page, pageSize: FINDER_PAGE },
    signal,
  };
  if (sort === 'title') return api.get<Page<Tune>>(`/circles/${circleId}/tunes`, asked);
  // In the order of their prices; the prices themselves are reckoned from the board in hand.
  const priced = await api.get<PricedTunePage>(`/sessions/${sessionId}/prices`, asked);
  return { ...priced, items: priced.items.map(({ tune }) => tune) };
}
