import { RegisterForm } from '../features/accounts/components/register-form';
import { EntryPage } from './entry-page';

export function RegisterPage() {
  return (
    <EntryPage
      title="Make an account"
      form={RegisterForm}
      other={{ words: 'Have one already?', link: 'Sign in', to: '/sign-in' }}
    />
  );
}
