import { zodResolver } from '@hookform/resolvers/zod';
import { addMemberSchema, type AddMember, type CircleMember } from '@pegwell/shared/contract/circles';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { FormProblems, SelectField, TextField } from '../../../ui/fields';
import { addMember } from '../api/members';
import { ROLE_WORDS } from '../role-words';
import styles from './members.module.css';

interface AddMemberFormProps {
  readonly circleId: string;
  readonly onAdded: (member: CircleMember) => Promise<void> | void;
}

/** Adds somebody who has an account, by their e-mail address. */
export function AddMemberForm({ circleId, onAdded }: AddMemberFormProps) {
  const { form, problems, submit } = useProblemForm<AddMember>({
    resolver: zodResolver(addMemberSchema),
    defaultValues: { email: '', role: 'player' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form
      className={styles.add}
      noValidate
      onSubmit={submit(async (member) => {
        const added = await addMember(circleId, member);
        form.reset({ email: '', role: member.role });
        await onAdded(added);
      })}
    >
      <TextField
        label="E-mail of their account"
        hint="They make the account themselves, under “Make an account”."
        type="email"
        autoComplete="off"
        error={errors.email?.message}
        {...form.register('email')}
      />
      <SelectField label="As" error={errors.role?.message} {...form.register('role')}>
        {(['player', 'cohost', 'host'] as const).map((role) => (
          <option key={role} value={role}>
            {`${role}: ${ROLE_WORDS[role]}`}
          </option>
        ))}
      </SelectField>
      <FormProblems problems={problems} />
      <div>
        <Button type="submit" busy={isSubmitting && 'Adding'}>
          Add to the circle
        </Button>
      </div>
    </form>
  );
}
