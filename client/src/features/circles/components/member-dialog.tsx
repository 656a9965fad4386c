import type { CircleMember, Role } from '@pegwell/shared/contract/circles';
import { useState } from 'react';
import { sentenceOf } from '../../../lib/problem';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { FormProblems, SelectField } from '../../../ui/fields';
import { ROLE_WORDS } from '../role-words';

interface MemberDialogProps {
  readonly member: CircleMember;
  readonly onRole: (role: Role) => Promise<void>;
  readonly onRemove: () => Promise<void>;
  readonly onClose: () => void;
}

/** What a host changes about a member: as what they are in the circle, or that they are in it. */
export function MemberDialog({ member, onRole, onRemove, onClose }: MemberDialogProps) {
  const [role, setRole] = useState(member.role);
  const [doing, setDoing] = useState<'role' | 'remove' | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const take = async (what: 'role' | 'remove', work: () => Promise<void>) => {
    setDoing(what);
    setProblem(null);
    try {
      await work();
      onClose();
    } catch (error) {
      setProblem(sentenceOf(error));
      setDoing(null);
    }
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={member.displayName}
      about="Who is taken out finds nothing of the circle any more; what they did stays. You can add them again."
      actions={
        <>
          <Button busy={doing === 'role' && 'Saving'} onClick={() => void take('role', () => onRole(role))}>
            Save
          </Button>
          <Button
            look="danger"
            busy={doing === 'remove' && 'Taking out'}
            onClick={() => void take('remove', onRemove)}
          >
            Take out of the circle
          </Button>
          <Button look="outline" onClick={onClose}>
            Cancel
          </Button>
        </>
      }
    >
      <SelectField label="As" value={role} onChange={(event) => setRole(event.target.value as Role)}>
        {(['player', 'cohost', 'host'] as const).map((each) => (
          <option key={each} value={each}>
            {`${each}: ${ROLE_WORDS[each]}`}
          </option>
        ))}
      </SelectField>
      <FormProblems problems={problem === null ? [] : [problem]} />
    </Dialog>
  );
}
