import { zodResolver } from '@hookform/resolvers/zod';
import { changePasswordSchema, type ChangePassword } from '@pegwell/shared/contract/accounts';
import { useQueryClient } from '@tanstack/react-query';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { FormProblems, TextField } from '../../../ui/fields';
import { useSay } from '../../../ui/status';
import { changePassword, signInsKey } from '../api/own-account';
import styles from './account-form.module.css';
import { AccountSection } from './account-section';
import { NewPasswordField } from './new-password-field';

export function PasswordSection() {
  const say = useSay();
  const client = useQueryClient();
  const { form, problems, submit } = useProblemForm<ChangePassword>({
    resolver: zodResolver(changePasswordSchema),
    defaultValues: { current: '', password: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <AccountSection title="Password" about="A new one ends all other sign-ins.">
      <form
        className={styles.form}
        noValidate
        onSubmit={submit(async (body) => {
          await changePassword(body);
          form.reset();
          say('Your password is changed, and all other sign-ins have ended.');
          await client.invalidateQueries({ queryKey: signInsKey });
        })}
      >
        <TextField
          label="Present password"
          type="password"
          autoComplete="current-password"
          error={errors.current?.message}
          {...form.register('current')}
        />
        <NewPasswordField
          label="New password"
          error={errors.password?.message}
          {...form.register('password')}
        />
        <FormProblems problems={problems} />
        <div>
          <Button type="submit" look="outline" busy={isSubmitting && 'Saving it'}>
            Change the password
          </Button>
        </div>
      </form>
    </AccountSection>
  );
}
