import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { getPlays, playsKey } from '../features/live/api/live';
import { RecordEvening } from '../features/live/components/record-evening';
import { byEvening } from '../features/live/record';
import { LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import { Pager } from '../ui/pager';
import { EmptyState, Failing, Loading } from '../ui/states';
import { useCircle } from './use-circle';

/** What a circle has really played. */
export function RecordPage() {
  const circle = useCircle();
  const [search, setSearch] = useSearchParams();
  const page = Math.max(1, Math.floor(Number(search.get('page'))) || 1);
  const plays = useQuery({
    queryKey: playsKey(circle.id, page),
    queryFn: ({ signal }) => getPlays(circle.id, page, signal),
    placeholderData: keepPreviousData,
    staleTime: 0,
  });
  return (
    <Page>
      <PageHeading title="Record" about="What was really played, newest evening first." />
      {plays.data ? (
        <>
          {plays.data.total === 0 ? (
            <EmptyState
              title="Nothing was played yet"
              action={
                <LinkButton to={`/c/${circle.id}/evenings`} look="outline">
                  To the evenings
                </LinkButton>
              }
            >
              Run an evening from its console: every tune that is called and played is written down here, with
              its tunings and how long the room took to tune.
            </EmptyState>
          ) : null}
          {byEvening(plays.data.items).map((evening) => (
            <RecordEvening key={evening.sessionId} evening={evening} />
          ))}
          <Pager
            page={page}
            pageSize={plays.data.pageSize}
            total={plays.data.total}
            what="tunes played"
            onPage={(next) => setSearch(next === 1 ? {} : { page: String(next) })}
          />
        </>
      ) : plays.isError ? (
        <Failing
          title="The record could not be loaded"
          error={plays.error}
          onRetry={() => void plays.refetch()}
        />
      ) : (
        <Loading what="the record" />
      )}
    </Page>
  );
}
