import { zodResolver } from '@hookform/resolvers/zod';
import { resetSchema, type Reset } from '@pegwell/shared/contract/accounts';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { FormProblems } from '../../../ui/fields';
import { resetPassword } from '../api/links';
import styles from './account-form.module.css';
import { NewPasswordField } from './new-password-field';

interface ResetFormProps {
  /** From the link. */
  readonly token: string;
  readonly onReset: () => void;
}

/** A new password by a link from a mail. */
export function ResetForm({ token, onReset }: ResetFormProps) {
  const { form, problems, submit } = useProblemForm<Reset>({
    resolver: zodResolver(resetSchema),
    defaultValues: { token, password: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (body) => {
        await resetPassword(body);
        onReset();
      })}
    >
      <NewPasswordField
        label="New password"
        error={errors.password?.message}
        {...form.register('password')}
      />
      <FormProblems problems={problems} />
      <div>
        <Button type="submit" busy={isSubmitting && 'Saving it'}>
          Take this password
        </Button>
      </div>
    </form>
  );
}
