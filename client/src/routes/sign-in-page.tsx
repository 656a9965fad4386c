import { SignInForm } from '../features/accounts/components/sign-in-form';
import { EntryPage } from './entry-page';

export function SignInPage() {
  return (
    <EntryPage
      title="Sign in"
      form={SignInForm}
      other={{ words: 'New here?', link: 'Make an account', to: '/register' }}
    />
  );
}
