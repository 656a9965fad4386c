import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { EVENINGS_A_PAGE, eveningsKey, getEvenings } from '../features/sessions/api/evening-list';
import { EveningRows } from '../features/sessions/components/evening-rows';
import { inTime } from '../features/sessions/evening-times';
import { LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import { Pager } from '../ui/pager';
import { Failing, Loading } from '../ui/states';
import styles from './evenings-page.module.css';
import { FirstSteps } from './first-steps';
import { useCircle } from './use-circle';

/** The circle's home: what is coming first, then what was. */
export function EveningsPage() {
  const circle = useCircle();
  const [page, setPage] = useState(1);
  const [now] = useState(() => Date.now());
  const evenings = useQuery({
    queryKey: [...eveningsKey(circle.id), page],
    queryFn: ({ signal }) => getEvenings(circle.id, page, signal),
    placeholderData: keepPreviousData,
  });
  const mayChange = circle.may('sessions.change');
  const found = evenings.data;
  const { coming, past } = inTime(found?.items ?? [], now);
  const rows = { circleId: circle.id, timeZone: circle.timeZone, mayRun: circle.may('live.run') };
  const none = found?.total === 0;
  return (
    <Page>
      <PageHeading title="Evenings" about={none ? undefined : circle.name}>
        {mayChange && found && !none ? (
          <LinkButton to={`/c/${circle.id}/evenings/new`}>Plan an evening</LinkButton>
        ) : null}
      </PageHeading>
      {evenings.isError ? (
        <Failing
          title="The evenings could not be loaded"
          error={evenings.error}
          onRetry={() => void evenings.refetch()}
        />
      ) : !found ? (
        <Loading what="the evenings" />
      ) : none ? (
        <FirstSteps circle={circle} />
      ) : (
        <>
          {page === 1 ? (
            <section aria-labelledby="coming">
              <h2 id="coming" className={styles.part}>
                Coming
              </h2>
              {coming.length > 0 ? (
                <EveningRows {...rows} evenings={coming} />
              ) : (
                <p className={styles.none}>Nothing is planned.</p>
              )}
            </section>
          ) : null}
          {past.length > 0 ? (
            <section aria-labelledby="past" className={styles.past}>
              <h2 id="past" className={styles.part}>
                Past
              </h2>
              <EveningRows {...rows} evenings={past} past />
            </section>
          ) : null}
          <Pager
            page={page}
            pageSize={EVENINGS_A_PAGE}
            total={found.total}
            what="evenings"
            onPage={setPage}
          />
        </>
      )}
    </Page>
  );
}
