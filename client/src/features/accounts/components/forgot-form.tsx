import { zodResolver } from '@hookform/resolvers/zod';
import { forgotSchema, type Forgot } from '@pegwell/shared/contract/accounts';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { FormProblems, TextField } from '../../../ui/fields';
import { forgot } from '../api/links';
import styles from './account-form.module.css';

/** Asks for a link by mail; `onAsked` hears for which address. */
export function ForgotForm({ onAsked }: { readonly onAsked: (email: string) => void }) {
  const { form, problems, submit } = useProblemForm<Forgot>({
    resolver: zodResolver(forgotSchema),
    defaultValues: { email: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (body) => {
        await forgot(body);
        onAsked(body.email);
      })}
    >
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register('email')}
      />
      <FormProblems problems={problems} />
      <div>
        <Button type="submit" busy={isSubmitting && 'Asking'}>
          Send me a link
        </Button>
      </div>
    </form>
  );
}
