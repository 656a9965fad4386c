import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import type { Evening } from '@pegwell/shared/session/evening';
import { Insertions } from '@pegwell/shared/session/insert';
import { useInfiniteQuery } from '@tanstack/react-query';
import { memo, useDeferredValue, useEffect, useMemo, useRef, useState } from 'react';
import { ProblemError } from '../../../lib/problem';
import { useDebounced } from '../../../lib/use-debounced';
import { Button } from '../../../ui/button';
import { ChoiceSwitch } from '../../../ui/choice-switch';
import { TextField } from '../../../ui/fields';
import { Failing, Loading } from '../../../ui/states';
import { FINDER_PAGE, findTunes, finderKey, type FinderSort } from '../api/finder-tunes';
import { FinderFilters, type FinderFilter } from './finder-filters';
import { FinderRow, type FinderRowProps } from './finder-row';
import styles from './finder.module.css';

interface FinderProps extends Pick<FinderRowProps, 'board' | 'nowEntryId' | 'onAdd' | 'draggable'> {
  readonly session: Session;
  /** What the board is as it stands; prices are what one more tune adds to it. */
  readonly evening: Evening;
  readonly kinds: readonly string[];
}

const SORTS = [
  { value: 'title', label: 'By title' },
  { value: 'price', label: 'Cheapest first' },
] as const;

const NO_FILTER: FinderFilter = { key: '', kind: 'fiddle', tuning: '' };

/** The circle's tunes, each with what it would cost at its cheapest place. */
export function Finder({ session, evening, board, nowEntryId, kinds, ...row }: FinderProps) {
  const place = { circleId: session.circleId, sessionId: session.id };
  const [search, setSearch] = useState('');
  const [filter, setFilter] = useState<FinderFilter>({ ...NO_FILTER, kind: kinds[0] ?? 'fiddle' });
  const [sort, setSort] = useState<FinderSort>('title');
  const asked = {
    search: useDebounced(search.trim(), 200),
    ...filter,
    tuning: useDebounced(filter.tuning.trim(), 400),
  };
  const found = useInfiniteQuery({
    queryKey: finderKey(place, asked, sort),
    queryFn: ({ pageParam, signal }) => findTunes(place, asked, sort, pageParam, signal),
    initialPageParam: 1,
    getNextPageParam: ({ page, total }) => (page * FINDER_PAGE < total ? page + 1 : undefined),
    placeholderData: (before) => before,
    // An order by price is that of the board as it was when it was asked for.
    ...(sort === 'price' && { staleTime: 0 }),
  });
  // Another board, as it is saved, has other prices: all that is listed is put in order anew.
  const { refetch } = found;
  const { version } = session;
  const sorted = useRef(version);
  useEffect(() => {
    if (sort === 'price' && sorted.current !== version) void refetch();
    sorted.current = version;
  }, [version, sort, refetch]);
  const tunes = useMemo<readonly Tune[]>(
    () => found.data?.pages.flatMap(({ items }) => items) ?? [],
    [found.data],
  );
  // A card that moves is not held up by prices: rows follow the board when there is time.
  const stands = useDeferredValue(
    useMemo(() => ({ evening, board, nowEntryId, tunes }), [evening, board, nowEntryId, tunes]),
  );
  const total = found.data?.pages[0]?.total ?? 0;
  const refused = tuningProblem(found.error);
  const narrowed = asked.search !== '' || asked.key !== '' || asked.tuning !== '';

  return (
    <div className={styles.finder}>
      <div role="search">
        <TextField
          id="finder-search"
          type="search"
          label="Find a tune"
          hideLabel
          placeholder="Title"
          autoComplete="off"
          value={search}
          onChange={(event) => setSearch(event.target.value)}
        />
        <FinderFilters filter={filter} onFilter={setFilter} kinds={kinds} problem={refused} />
        <div className={styles.sort}>
          <ChoiceSwitch legend="In which order" choices={SORTS} value={sort} onChoose={setSort} />
        </div>
      </div>
      <p className="visually-hidden" role="status">
        {found.isSuccess ? `${total} found` : ''}
      </p>
      {found.isError && !refused ? (
        <Failing
          title="The tunes could not be loaded"
          error={found.error}
          onRetry={() => void found.refetch()}
        />
      ) : null}
      {found.isPending ? <Loading what="the tunes" /> : null}
      {found.isSuccess && total === 0 ? (
        <p className={styles.none}>
          {narrowed
            ? 'No tune fits. Look for less.'
            : 'This circle has no tunes yet. Add or import some under Tunes.'}
        </p>
      ) : null}
      <Rows {...stands} {...row} kinds={kinds} />
      {found.hasNextPage ? (
        <Button
          look="plain"
          wide
          busy={found.isFetchingNextPage && 'Loading'}
          onClick={() => void found.fetchNextPage()}
        >
          Show more of {total}
        </Button>
      ) : null}
    </div>
  );
}

interface RowsProps extends Omit<FinderRowProps, 'tune' | 'insertions'> {
  readonly tunes: readonly Tune[];
  readonly evening: Evening;
}

/** Looked at again only when the board or the tunes are others: not with every key that is pressed. */
const Rows = memo(function Rows({ tunes, evening, ...row }: RowsProps) {
  const insertions = useMemo(
    () => new Insertions(evening, row.nowEntryId === null ? 0 : 1),
    [evening, row.nowEntryId],
  );
  return (
    <ol className={styles.list}>
      {tunes.map((tune) => (
        <FinderRow key={tune.id} tune={tune} insertions={insertions} {...row} />
      ))}
    </ol>
  );
});

/** The sentence that refuses the tuning that is looked for. */
function tuningProblem(error: unknown): string | undefined {
  if (!(error instanceof ProblemError)) return undefined;
  return error.errors.find(({ path }) => path === 'tuning')?.message;
}
