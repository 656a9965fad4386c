import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { getRacks, racksKey } from '../features/racks/api/racks';
import { RacksView } from '../features/racks/components/racks-view';
import { BackLink } from '../ui/back-link';
import { LinkButton } from '../ui/button';
import { Page } from '../ui/page';
import { Failing, Loading } from '../ui/states';
import { useCircle } from './use-circle';

/** Milliseconds between two looks at what changed on the board meanwhile. */
const LOOK = 10_000;

/** The instruments that players bring to an evening. */
export function RacksPage() {
  const { sessionId = '' } = useParams();
  const circle = useCircle();
  const board = `/c/${circle.id}/evenings/${sessionId}`;
  const racks = useQuery({
    queryKey: racksKey(sessionId),
    queryFn: ({ signal }) => getRacks(sessionId, signal),
    refetchInterval: LOOK,
    staleTime: 0,
  });
  return (
    <Page>
      {racks.data ? (
        <>
          <BackLink to={board}>{racks.data.evening.title}</BackLink>
          <RacksView sessionId={sessionId} racks={racks.data} mayChange={circle.may('sessions.change')} />
        </>
      ) : racks.isError ? (
        <Failing
          title="This evening cannot be shown"
          error={racks.error}
          onRetry={() => void racks.refetch()}
        >
          <LinkButton to={`/c/${circle.id}/evenings`} look="outline">
            To the evenings
          </LinkButton>
        </Failing>
      ) : (
        <Loading what="the instruments" />
      )}
    </Page>
  );
}
