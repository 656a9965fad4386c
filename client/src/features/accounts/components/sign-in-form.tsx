import type { Login } from '@pegwell/shared/contract/accounts';
import { Link } from 'react-router-dom';
import { Button } from '../../../ui/button';
import { FormProblems, TextField } from '../../../ui/fields';
import { useProblemForm } from '../../../lib/use-problem-form';
import { signIn } from '../api/sign-in';
import styles from './account-form.module.css';

/** Asks for e-mail and password; `onSignedIn` runs once the server has set the cookie. */
export function SignInForm({ onSignedIn }: { readonly onSignedIn: () => Promise<void> | void }) {
  const { form, problems, submit } = useProblemForm<Login>({ defaultValues: { email: '', password: '' } });
  const { errors, isSubmitting } = form.formState;
  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (login) => {
        await signIn(login);
        await onSignedIn();
      })}
    >
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register('email', { required: 'Type your e-mail address.' })}
      />
      <TextField
        label="Password"
        type="password"
        autoComplete="current-password"
        error={errors.password?.message}
        {...form.register('password', { required: 'Type your password.' })}
      />
      <FormProblems problems={problems} />
      <Button type="submit" wide busy={isSubmitting && 'Signing in'}>
        Sign in
      </Button>
      <Link className={styles.forgot} to="/forgot">
        Forgot your password?
      </Link>
    </form>
  );
}
