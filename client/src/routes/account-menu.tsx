import type { Me } from '@pegwell/shared/contract/accounts';
import { useNavigate } from 'react-router-dom';
import { useSignOut } from '../features/accounts/hooks/use-sign-out';
import { sentenceOf } from '../lib/problem';
import { ActionMenu } from '../ui/action-menu';
import { useSay } from '../ui/status';
import styles from './header.module.css';

const initialsOf = (name: string) =>
  name
    .trim()
    .split(/\s+/)
    .slice(0, 2)
    .map((word) => [...word][0]?.toUpperCase() ?? '')
    .join('');

/** Whose account this is, the way to it and to the other circles, and out. */
export function AccountMenu({ me }: { readonly me: Me }) {
  const navigate = useNavigate();
  const say = useSay();
  const signOut = useSignOut();
  return (
    <ActionMenu
      title={me.user.displayName}
      trigger={
        <button type="button" className={styles.icon} aria-label={`Account of ${me.user.displayName}`}>
          <span className={styles.initials} aria-hidden="true">
            {initialsOf(me.user.displayName)}
          </span>
        </button>
      }
      groups={[
        [
          { id: 'circles', label: 'Your circles', onSelect: () => void navigate('/') },
          { id: 'account', label: 'Your account', onSelect: () => void navigate('/account') },
        ],
        [
          {
            id: 'out',
            label: 'Sign out',
            onSelect: () => {
              signOut.mutate(undefined, {
                onSuccess: () => void navigate('/sign-in'),
                onError: (error) => say(sentenceOf(error)),
              });
            },
          },
        ],
      ]}
    />
  );
}
