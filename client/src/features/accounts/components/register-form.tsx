import { zodResolver } from '@hookform/resolvers/zod';
import { registerSchema, type Register } from '@pegwell/shared/contract/accounts';
import { Button } from '../../../ui/button';
import { FormProblems, TextField } from '../../../ui/fields';
import { useProblemForm } from '../../../lib/use-problem-form';
import { register } from '../api/sign-in';
import styles from './account-form.module.css';
import { NewPasswordField } from './new-password-field';

/** Makes an account, checked by the same schema as the server; signed in afterwards. */
export function RegisterForm({ onSignedIn }: { readonly onSignedIn: () => Promise<void> | void }) {
  const { form, problems, submit } = useProblemForm<Register>({
    resolver: zodResolver(registerSchema),
    defaultValues: { displayName: '', email: '', password: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (account) => {
        await register(account);
        await onSignedIn();
      })}
    >
      <TextField
        label="Your name"
        hint="As the others in the circle know you."
        autoComplete="name"
        error={errors.displayName?.message}
        {...form.register('displayName')}
      />
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register('email')}
      />
      <NewPasswordField label="Password" error={errors.password?.message} {...form.register('password')} />
      <FormProblems problems={problems} />
      <Button type="submit" wide busy={isSubmitting && 'Making your account'}>
        Make an account
      </Button>
    </form>
  );
}
