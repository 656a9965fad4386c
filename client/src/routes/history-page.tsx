import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { getHistory, historyKey } from '../features/circles/api/history';
import { HistoryList } from '../features/circles/components/history-list';
import { BackLink } from '../ui/back-link';
import { Page, PageHeading } from '../ui/page';
import { Pager } from '../ui/pager';
import { EmptyState, Failing, Loading } from '../ui/states';
import { useCircle } from './use-circle';

/** Who did what in the circle, for those who answer for it. */
export function HistoryPage() {
  const circle = useCircle();
  const [search, setSearch] = useSearchParams();
  const page = Math.max(1, Math.floor(Number(search.get('page'))) || 1);
  const history = useQuery({
    queryKey: historyKey(circle.id, page),
    queryFn: ({ signal }) => getHistory(circle.id, page, signal),
    placeholderData: keepPreviousData,
    staleTime: 0,
  });
  return (
    <Page narrow>
      <BackLink to={`/c/${circle.id}/people`}>People</BackLink>
      <PageHeading title="What happened" about="Who changed what in this circle, newest first." />
      {history.data ? (
        <>
          {history.data.total === 0 ? (
            <EmptyState title="Nothing was changed yet">
              From now on every change is written down here, with who made it and when.
            </EmptyState>
          ) : null}
          <HistoryList events={history.data.items} timeZone={circle.timeZone} />
          <Pager
            page={page}
            pageSize={history.data.pageSize}
            total={history.data.total}
            what="changes"
            onPage={(next) => setSearch(next === 1 ? {} : { page: String(next) })}
          />
        </>
      ) : history.isError ? (
        <Failing
          title="What happened could not be loaded"
          error={history.error}
          onRetry={() => void history.refetch()}
        />
      ) : (
        <Loading what="what happened" />
      )}
    </Page>
  );
}
