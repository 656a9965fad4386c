import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import type { Evening } from '@pegwell/shared/session/evening';
import { Insertions } from '@pegwell/shared/session/insert';
import { useInfiniteQuery } from '@tanstack/react-query';
import { useDeferredValue, useMemo, useRef, useState } from 'react';
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
  const place = { circleId: session.circleId, sessionId: session.id, version: session.version };
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
  });
  const tunes = useMemo<readonly Tune[]>(
    () => found.data?.pages.flatMap(({ items }) => items) ?? [],
    [found.data],
  );
  // A card that moves is not held up by prices: rows follow the board when there is time.
  const stands = useDeferredValue(
    useMemo(() => ({ evening, board, nowEntryId }), [evening, board, nowEntryId]),
  );
  const insertions = useMemo(
    () => new Insertions(stands.evening, stands.nowEntryId === null ? 0 : 1),
    [stands],
  );
  const total = found.data?.pages[0]?.total ?? 0;
  const list = useRef<HTMLOListElement>(null);
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
      <ol className={styles.list} ref={list}>
        {tunes.map((tune) => (
          <FinderRow
            key={tune.id}
            tune={tune}
            insertions={insertions}
            board={stands.board}
            nowEntryId={stands.nowEntryId}
            kinds={kinds}
            {...row}
          />
        ))}
      </ol>
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

/** The sentence that refuses the tuning that is looked for. */
function tuningProblem(error: unknown): string | undefined {
  if (!(error instanceof ProblemError)) return undefined;
  return error.errors.find(({ path }) => path === 'tuning')?.message;
}
