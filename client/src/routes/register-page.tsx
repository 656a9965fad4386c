import { Navigate } from 'react-router-dom';
import { RegisterForm } from '../features/accounts/components/register-form';
import { useMe } from '../features/accounts/hooks/use-me';
import { Entry } from './entry';
import { useAfterSignIn, useNext } from './use-after-sign-in';

export function RegisterPage() {
  const me = useMe();
  const next = useNext();
  const afterSignIn = useAfterSignIn();
  if (me.data) return <Navigate to={next} replace />;
  return (
    <Entry
      title="Make an account"
      form={<RegisterForm onSignedIn={afterSignIn} />}
      other={{
        words: 'Have one already?',
        link: 'Sign in',
        to: `/sign-in${next === '/' ? '' : `?next=${encodeURIComponent(next)}`}`,
      }}
    />
  );
}
