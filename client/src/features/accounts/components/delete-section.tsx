import { zodResolver } from '@hookform/resolvers/zod';
import { deleteAccountSchema, type DeleteAccount } from '@pegwell/shared/contract/accounts';
import { useId, useState } from 'react';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { FormProblems, TextField } from '../../../ui/fields';
import { deleteAccount } from '../api/own-account';
import { AccountSection } from './account-section';
import styles from './account-section.module.css';

/** `onDeleted` runs when the account is gone. */
export function DeleteSection({ onDeleted }: { readonly onDeleted: () => void }) {
  const [asking, setAsking] = useState(false);
  return (
    <AccountSection
      title="Delete your account"
      about="Your name, address and sign-ins go for good. Tunes and evenings stay with their circles, without your name; a circle that you alone are in goes too."
    >
      <div className={styles.do}>
        <Button look="danger" onClick={() => setAsking(true)}>
          Delete my account …
        </Button>
      </div>
      {asking ? <DeleteDialog onClose={() => setAsking(false)} onDeleted={onDeleted} /> : null}
    </AccountSection>
  );
}

interface DeleteDialogProps {
  readonly onClose: () => void;
  readonly onDeleted: () => void;
}

function DeleteDialog({ onClose, onDeleted }: DeleteDialogProps) {
  const formId = useId();
  const { form, problems, submit } = useProblemForm<DeleteAccount>({
    resolver: zodResolver(deleteAccountSchema),
    defaultValues: { current: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <Dialog
      open
      onClose={onClose}
      title="Delete your account?"
      about="This cannot be undone."
      actions={
        <>
          <Button look="danger" type="submit" form={formId} busy={isSubmitting && 'Deleting it'}>
            Delete my account
          </Button>
          <Button look="outline" onClick={onClose}>
            Keep it
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        onSubmit={submit(async (body) => {
          await deleteAccount(body);
          onDeleted();
        })}
      >
        <TextField
          label="Your password"
          type="password"
          autoComplete="current-password"
          error={errors.current?.message}
          {...form.register('current')}
        />
        <FormProblems problems={problems} />
      </form>
    </Dialog>
  );
}
