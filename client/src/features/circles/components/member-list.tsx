import type { CircleMember } from '@pegwell/shared/contract/circles';
import { Button } from '../../../ui/button';
import styles from './members.module.css';

const ORDER = ['host', 'cohost', 'player'] as const;

interface MemberListProps {
  readonly members: readonly CircleMember[];
  /** The reader's own account. */
  readonly ownId: string | undefined;
  /** Where the reader may change who is in. */
  readonly onChange?: ((member: CircleMember) => void) | undefined;
}

/** Hosts first, then cohosts and players, each by name. E-mail addresses only where the server gives them. */
export function MemberList({ members, ownId, onChange }: MemberListProps) {
  const sorted = [...members].sort(
    (a, b) =>
      ORDER.indexOf(a.role) - ORDER.indexOf(b.role) || a.displayName.localeCompare(b.displayName, 'en'),
  );
  return (
    <ul className={styles.members}>
      {sorted.map((member) => {
        const { accountId, displayName, email, role } = member;
        return (
          <li key={accountId}>
            <span className={styles.name}>
              <b>
                <bdi>{displayName}</bdi>
              </b>
              {accountId === ownId ? ' (you)' : null}
              {email ? <span className={styles.email}>{email}</span> : null}
            </span>
            <span className={styles.role}>{role}</span>
            {onChange ? (
              <Button look="plain" aria-label={`Change ${displayName}`} onClick={() => onChange(member)}>
                Change
              </Button>
            ) : null}
          </li>
        );
      })}
    </ul>
  );
}
