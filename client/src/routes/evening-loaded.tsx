import type { Session } from '@pegwell/shared/contract/sessions';
import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useParams } from 'react-router-dom';
import { getSession, sessionKey } from '../features/sessions/api/session';
import { LinkButton } from '../ui/button';
import { Page } from '../ui/page';
import { Failing, Loading } from '../ui/states';

/** Milliseconds between two looks at what the other hosts do, while the page is seen. */
const LOOK = 5_000;

/** The page of one evening: waits for it, and says so when it cannot be had. */
export function EveningLoaded({ children }: { readonly children: (session: Session) => ReactNode }) {
  const { sessionId = '' } = useParams();
  const session = useQuery({
    queryKey: sessionKey(sessionId),
    queryFn: ({ signal }) => getSession(sessionId, signal),
    refetchInterval: LOOK,
    staleTime: 0,
  });
  return (
    <Page>
      {session.data ? (
        children(session.data)
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
