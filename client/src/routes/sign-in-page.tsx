import { Navigate } from 'react-router-dom';
import { SignInForm } from '../features/accounts/components/sign-in-form';
import { useMe } from '../features/accounts/hooks/use-me';
import { Entry } from './entry';
import { useAfterSignIn, useNext } from './use-after-sign-in';

export function SignInPage() {
  const me = useMe();
  const next = useNext();
  const afterSignIn = useAfterSignIn();
  if (me.data) return <Navigate to={next} replace />;
  return (
    <Entry
      title="Sign in"
      form={<SignInForm onSignedIn={afterSignIn} />}
      other={{
        words: 'New here?',
        link: 'Make an account',
        to: `/register${next === '/' ? '' : `?next=${encodeURIComponent(next)}`}`,
      }}
    />
  );
}
