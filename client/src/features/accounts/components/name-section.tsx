import { zodResolver } from '@hookform/resolvers/zod';
import { renameSchema, type Rename, type User } from '@pegwell/shared/contract/accounts';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { FormProblems, TextField } from '../../../ui/fields';
import { useSay } from '../../../ui/status';
import { rename } from '../api/own-account';
import { useRenewMe } from '../hooks/use-renew-me';
import styles from './account-form.module.css';
import { AccountSection } from './account-section';

export function NameSection({ user }: { readonly user: User }) {
  const say = useSay();
  const renewMe = useRenewMe();
  const { form, problems, submit } = useProblemForm<Rename>({
    resolver: zodResolver(renameSchema),
    defaultValues: { displayName: user.displayName },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <AccountSection title="Name" about="As the others in your circles see you.">
      <form
        className={styles.form}
        noValidate
        onSubmit={submit(async (body) => {
          const { displayName } = await rename(body);
          form.reset({ displayName });
          await renewMe();
          say('Your name is changed.');
        })}
      >
        <TextField
          label="Your name"
          autoComplete="name"
          error={errors.displayName?.message}
          {...form.register('displayName')}
        />
        <FormProblems problems={problems} />
        <div>
          <Button type="submit" look="outline" busy={isSubmitting && 'Saving it'}>
            Save the name
          </Button>
        </div>
      </form>
    </AccountSection>
  );
}
