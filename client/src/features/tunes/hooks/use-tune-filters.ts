import { useSearchParams } from 'react-router-dom';
import type { TuneFilters } from '../api/tune-list';

const FILTERS = ['search', 'kind', 'tuning', 'key', 'mode', 'rhythm'] as const;
type Change = Partial<Record<(typeof FILTERS)[number] | 'sort', string>> & { readonly page?: number };

export interface TuneFiltersInAddress {
  readonly filters: TuneFilters;
  /** How many of them narrow the list. */
  readonly active: number;
  /** Empty takes a filter away; any change but of the page goes back to the first page. */
  readonly change: (change: Change) => void;
  readonly clear: () => void;
}

/** The filters as they stand in the address, so that a list can be linked to, kept, and gone back to. */
export function useTuneFilters(): TuneFiltersInAddress {
  const [params, setParams] = useSearchParams();
  const of = (name: string) => params.get(name) ?? '';
  const kind = of('kind');
  const page = Number(of('page'));
  const filters: TuneFilters = {
    search: of('search'),
    kind,
    // A tuning is one of an instrument: without one it says nothing.
    tuning: kind ? of('tuning') : '',
    key: of('key'),
    mode: of('mode'),
    rhythm: of('rhythm'),
    sort: of('sort') || 'title',
    page: Number.isInteger(page) && page > 0 ? page : 1,
  };

  const change = ({ page: next, ...rest }: Change) =>
    setParams(
      (before) => {
        const after = new URLSearchParams(before);
        for (const [name, value] of Object.entries(rest)) {
          if (value) after.set(name, value);
          else after.delete(name);
        }
        if ('kind' in rest) after.delete('tuning');
        if (after.get('sort') === 'title') after.delete('sort');
        if (next && next > 1) after.set('page', String(next));
        else after.delete('page');
        return after;
      },
      // A page is a place to come back to; a letter typed into the search is not.
      { replace: next === undefined },
    );

  return {
    filters,
    active: FILTERS.filter((name) => filters[name] !== '').length,
    change,
    clear: () => change(Object.fromEntries(FILTERS.map((name) => [name, '']))),
  };
}
