import { useQuery } from '@tanstack/react-query';
import { Outlet, useParams } from 'react-router-dom';
import { circleKey, getCircle } from '../features/circles/api/circle';
import { LinkButton } from '../ui/button';
import { Page } from '../ui/page';
import { Failing, Loading } from '../ui/states';

/** Loads the circle that the address names; its pages read it with `useCircle`. */
export function CircleLayout() {
  const { circleId = '' } = useParams();
  const circle = useQuery({
    queryKey: circleKey(circleId),
    queryFn: ({ signal }) => getCircle(circleId, signal),
  });
  if (circle.data) return <Outlet context={circle.data} />;
  return (
    <Page>
      {circle.isError ? (
        <Failing
          title="This circle cannot be shown"
          heading="h1"
          error={circle.error}
          onRetry={() => void circle.refetch()}
        >
          <LinkButton to="/" look="outline">
            To your circles
          </LinkButton>
        </Failing>
      ) : (
        <Loading what="the circle" />
      )}
    </Page>
  );
}
