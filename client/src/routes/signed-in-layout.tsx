import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { useMe } from '../features/accounts/hooks/use-me';
import { Page } from '../ui/page';
import { Failing, Loading } from '../ui/states';

/** Pages for people with an account; others are led to the sign-in page and back again. */
export function SignedInLayout() {
  const me = useMe();
  const { pathname, search } = useLocation();
  if (me.data) return <Outlet />;
  if (me.data === null) {
    const next = pathname === '/' ? '' : `?next=${encodeURIComponent(pathname + search)}`;
    return <Navigate to={`/sign-in${next}`} replace />;
  }
  return (
    <Page narrow>
      {me.isError ? (
        <Failing
          heading="h1"
          title="Pegwell did not answer"
          error={me.error}
          onRetry={() => void me.refetch()}
        />
      ) : (
        <Loading what="your circles" />
      )}
    </Page>
  );
}
