import { zodResolver } from '@hookform/resolvers/zod';
import { changeEmailSchema, type ChangeEmail, type User } from '@pegwell/shared/contract/accounts';
import { useState } from 'react';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { FormProblems, TextField } from '../../../ui/fields';
import { changeEmail } from '../api/own-account';
import { useMailState } from '../hooks/use-mail-state';
import styles from './account-form.module.css';
import { AccountSection } from './account-section';
import { UnconfirmedLine } from './unconfirmed-line';

/** The address one signs in with. Another is taken once its own mail confirms it. */
export function AddressSection({ user }: { readonly user: User }) {
  const mail = useMailState();
  return (
    <AccountSection
      title="E-mail address"
      about={
        <>
          You sign in with <b>{user.email}</b>
          {user.confirmed ? ', and mail to it reaches you.' : '.'}
        </>
      }
    >
      {user.confirmed ? null : (
        <div className={styles.spaced}>
          <UnconfirmedLine email={user.email} />
        </div>
      )}
      {mail.data?.sends === false ? (
        <p className={styles.other}>
          This server sends no mail, so an address can be neither confirmed nor changed here. Ask whoever runs
          it.
        </p>
      ) : null}
      {mail.data?.sends ? <AddressForm /> : null}
    </AccountSection>
  );
}

function AddressForm() {
  const [asked, setAsked] = useState<string | null>(null);
  const { form, problems, submit } = useProblemForm<ChangeEmail>({
    resolver: zodResolver(changeEmailSchema),
    defaultValues: { email: '', current: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (body) => {
        await changeEmail(body);
        form.reset();
        setAsked(body.email);
      })}
    >
      <TextField
        label="Another address"
        type="email"
        autoComplete="email"
        error={errors.email?.message}
        {...form.register('email')}
      />
      <TextField
        label="Your password"
        type="password"
        autoComplete="current-password"
        error={errors.current?.message}
        {...form.register('current')}
      />
      <FormProblems problems={problems} />
      <p role="status" className={styles.done}>
        {asked ? `A mail went to ${asked}. Your address changes when you press the link in it.` : null}
      </p>
      <div>
        <Button type="submit" look="outline" busy={isSubmitting && 'Asking'}>
          Change the address
        </Button>
      </div>
    </form>
  );
}
