import type { Tune } from '@pegwell/shared/contract/tunes';
import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useLocation, useParams } from 'react-router-dom';
import { getTune, tuneKey } from '../features/tunes/api/tune';
import { LinkButton } from '../ui/button';
import { Page } from '../ui/page';
import { Failing, Loading } from '../ui/states';
import { useCircle } from './use-circle';

/** Where the reader came from in the library, with its filters. */
export function useBackToTunes(): string {
  const circle = useCircle();
  const state = useLocation().state as { back?: unknown } | null;
  return typeof state?.back === 'string' ? state.back : `/c/${circle.id}/tunes`;
}

/** The tune that the address names, or what to show while there is none. */
export function useTune(): { readonly tune: Tune } | { readonly tune: null; readonly instead: ReactNode } {
  const circle = useCircle();
  const back = useBackToTunes();
  const { tuneId = '' } = useParams();
  const tune = useQuery({
    queryKey: tuneKey(circle.id, tuneId),
    queryFn: ({ signal }) => getTune(circle.id, tuneId, signal),
  });
  if (tune.data) return { tune: tune.data };
  const instead = (
    <Page narrow>
      {tune.isError ? (
        <Failing title="This tune cannot be shown" error={tune.error} onRetry={() => void tune.refetch()}>
          <LinkButton to={back} look="outline">
            To the tunes
          </LinkButton>
        </Failing>
      ) : (
        <Loading what="the tune" />
      )}
    </Page>
  );
  return { tune: null, instead };
}
