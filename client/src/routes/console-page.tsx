import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { Console } from '../features/live/components/console';
import { getSession, sessionKey } from '../features/sessions/api/session';
import { LinkButton } from '../ui/button';
import { Page } from '../ui/page';
import { Failing, Loading } from '../ui/states';

/** ms between two looks at the board, which another host may change meanwhile. */
const LOOK = 5_000;

/** The evening while it is played. */
export function ConsolePage() {
  const { sessionId = '' } = useParams();
  const queries = useQueryClient();
  const session = useQuery({
    queryKey: sessionKey(sessionId),
    queryFn: ({ signal }) => getSession(sessionId, signal),
    refetchInterval: LOOK,
    staleTime: 0,
  });
  return (
    <Page>
      {session.data ? (
        <Console
          session={session.data}
          onStep={() => void queries.invalidateQueries({ queryKey: sessionKey(sessionId) })}
        />
      ) : session.isError ? (
        <Failing
          title="This evening cannot be shown"
          error={session.error}
          onRetry={() => void session.refetch()}
        >
          <LinkButton to="../evenings" look="outline">
            To the evenings
          </LinkButton>
        </Failing>
      ) : (
        <Loading what="the evening" />
      )}
    </Page>
  );
}
