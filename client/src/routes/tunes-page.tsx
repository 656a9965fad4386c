import type { Tune } from '@pegwell/shared/contract/tunes';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link, useLocation } from 'react-router-dom';
import { TUNES_A_PAGE, exportUrl, getTunes, tuneListKey } from '../features/tunes/api/tune-list';
import { TuneFilters } from '../features/tunes/components/tune-filters';
import { TuneRows } from '../features/tunes/components/tune-rows';
import { TuneTable } from '../features/tunes/components/tune-table';
import { useTuneFilters } from '../features/tunes/hooks/use-tune-filters';
import { count, grouped } from '../lib/format';
import { ProblemError } from '../lib/problem';
import { useMedia } from '../lib/use-media';
import { Button, LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import { Pager } from '../ui/pager';
import { EmptyState, Failing, Loading } from '../ui/states';
import styles from './tunes-page.module.css';
import { useCircle } from './use-circle';

/** The circle's library: found, filtered and paged by the server; the filters stand in the address. */
export function TunesPage() {
  const circle = useCircle();
  const narrow = useMedia('(max-width: 700px)');
  const inAddress = useTuneFilters();
  const { filters, active, change, clear } = inAddress;
  const { pathname, search } = useLocation();
  const tunes = useQuery({
    queryKey: tuneListKey(circle.id, filters),
    queryFn: ({ signal }) => getTunes(circle.id, filters, signal),
    placeholderData: keepPreviousData,
  });
  const mayChange = circle.may('tunes.change');
  const tuningError =
    tunes.error instanceof ProblemError
      ? tunes.error.errors.find(({ path }) => path === 'tuning')?.message
      : undefined;
  const found = tunes.data;
  const empty = found?.total === 0 && active === 0;
  const linkTo = (tune: Tune) => (
    <Link to={`/c/${circle.id}/tunes/${tune.id}`} state={{ back: pathname + search }}>
      {tune.title}
    </Link>
  );

  return (
    <Page>
      <PageHeading
        title="Tunes"
        about={
          tunes.isPlaceholderData
            ? 'Looking …'
            : found && !empty
              ? foundWords(found.total, active > 0)
              : undefined
        }
      >
        {mayChange && !empty ? (
          <>
            <LinkButton to={`/c/${circle.id}/tunes/new`}>Add a tune</LinkButton>
            <LinkButton look="outline" to={`/c/${circle.id}/tunes/import`}>
              Import a list
            </LinkButton>
          </>
        ) : null}
      </PageHeading>
      {empty ? <NoTunesYet circleId={circle.id} mayChange={mayChange} /> : null}
      {empty ? null : <TuneFilters {...inAddress} narrow={narrow} tuningError={tuningError} />}
      {tunes.isError && !tuningError ? (
        <Failing
          title="The tunes could not be loaded"
          error={tunes.error}
          onRetry={() => void tunes.refetch()}
        />
      ) : null}
      {tunes.isPending ? <Loading what="the tunes" /> : null}
      {found && !empty && !tunes.isError ? (
        <>
          {found.items.length === 0 ? (
            <EmptyState
              title={found.total > 0 ? 'There are fewer pages than that' : 'No tune fits'}
              action={
                <Button look="outline" onClick={() => (found.total > 0 ? change({ page: 1 }) : clear())}>
                  {found.total > 0 ? 'To the first page' : 'Show all tunes'}
                </Button>
              }
            >
              {found.total > 0
                ? `${count(found.total, 'tune')} fit, on fewer pages.`
                : 'Take a filter away, or look for a part of the title.'}
            </EmptyState>
          ) : narrow ? (
            <TuneRows tunes={found.items} linkTo={linkTo} stale={tunes.isPlaceholderData} />
          ) : (
            <TuneTable
              tunes={found.items}
              sort={filters.sort}
              onSort={(sort) => change({ sort })}
              linkTo={linkTo}
              stale={tunes.isPlaceholderData}
            />
          )}
          <Pager
            page={filters.page}
            pageSize={TUNES_A_PAGE}
            total={found.total}
            what="tunes"
            onPage={(page) => {
              change({ page });
              window.scrollTo(0, 0);
            }}
          />
          <p className={styles.foot}>
            <span>Light letters are assumed from the circle’s usual tunings.</span>
            <span>
              The whole library as a file: <a href={exportUrl(circle.id, 'csv')}>CSV</a>
              {' or '}
              <a href={exportUrl(circle.id, 'abc')}>ABC</a>
            </span>
          </p>
        </>
      ) : null}
    </Page>
  );
}

const foundWords = (total: number, filtered: boolean) =>
  `${grouped(total)} ${total === 1 ? 'tune' : 'tunes'}${filtered ? (total === 1 ? ' fits' : ' fit') : ''}`;

function NoTunesYet({ circleId, mayChange }: { readonly circleId: string; readonly mayChange: boolean }) {
  if (!mayChange)
    return (
      <EmptyState title="No tunes yet">
        The host has not brought the circle’s tunes yet. They will stand here.
      </EmptyState>
    );
  return (
    <EmptyState
      title="First, bring your tunes"
      action={
        <>
          <LinkButton to={`/c/${circleId}/tunes/import`}>Import a list</LinkButton>
          <LinkButton look="outline" to={`/c/${circleId}/tunes/new`}>
            Add one by hand
          </LinkButton>
        </>
      }
    >
      A spreadsheet saved as CSV will do: a column of titles and one of keys. Tunings can come with it or
      later; until then Pegwell assumes the usual ones and says so.
    </EmptyState>
  );
}
