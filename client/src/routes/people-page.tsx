import type { CircleMember } from '@pegwell/shared/contract/circles';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { meKey } from '../features/accounts/api/me';
import { useMe } from '../features/accounts/hooks/use-me';
import {
  changeRole,
  getMembers,
  leaveCircle,
  membersKey,
  removeMember,
} from '../features/circles/api/members';
import { AddMemberForm } from '../features/circles/components/add-member-form';
import { LeaveCircle } from '../features/circles/components/leave-circle';
import { MemberDialog } from '../features/circles/components/member-dialog';
import { MemberList } from '../features/circles/components/member-list';
import { Page, PageHeading } from '../ui/page';
import { Failing, Loading } from '../ui/states';
import { useSay } from '../ui/status';
import styles from './people-page.module.css';
import { useCircle } from './use-circle';

/** Who is in the circle and as what; a host adds people. */
export function PeoplePage() {
  const circle = useCircle();
  const me = useMe().data;
  const client = useQueryClient();
  const say = useSay();
  const navigate = useNavigate();
  const members = useQuery({
    queryKey: membersKey(circle.id),
    queryFn: ({ signal }) => getMembers(circle.id, signal),
  });
  const [changing, setChanging] = useState<CircleMember | null>(null);
  const mayChange = circle.may('members.change');
  const count = members.data?.items.length;
  return (
    <Page narrow>
      <PageHeading
        title="People"
        about={count === 1 ? 'Only you so far.' : count ? `${count} in the circle` : undefined}
      />
      {members.isError ? (
        <Failing
          title="The people could not be loaded"
          error={members.error}
          onRetry={() => void members.refetch()}
        />
      ) : members.data ? (
        <MemberList
          members={members.data.items}
          ownId={me?.user.id}
          onChange={mayChange ? setChanging : undefined}
        />
      ) : (
        <Loading what="the people" />
      )}
      {changing ? (
        <MemberDialog
          member={changing}
          onClose={() => setChanging(null)}
          onRole={async (role) => {
            await changeRole(circle.id, changing.accountId, role);
            say(`${changing.displayName} is a ${role} now.`);
            // Of oneself, what one may do here changes with it.
            await client.invalidateQueries({ queryKey: ['circle', circle.id] });
          }}
          onRemove={async () => {
            await removeMember(circle.id, changing.accountId);
            say(`${changing.displayName} is out of the circle.`);
            await client.invalidateQueries({ queryKey: ['circle', circle.id] });
          }}
        />
      ) : null}
      {circle.may('history.read') ? (
        <p className={styles.roles}>
          <Link to={`/c/${circle.id}/history`}>What happened in the circle</Link>
        </p>
      ) : null}
      {mayChange ? (
        <section className={styles.add} aria-labelledby="add-member">
          <h2 id="add-member">Add somebody</h2>
          <AddMemberForm
            circleId={circle.id}
            onAdded={async (member) => {
              say(`${member.displayName} is in the circle now.`);
              await client.invalidateQueries({ queryKey: membersKey(circle.id) });
            }}
          />
        </section>
      ) : null}
      <p className={styles.roles}>
        Hosts and cohosts change tunes, tunings and evenings and run them; players read along and follow. Only
        a host adds people. Guests need none of this: they follow an evening by its code.
      </p>
      <LeaveCircle
        name={circle.name}
        onLeave={async () => {
          await leaveCircle(circle.id);
          say(`You have left ${circle.name}.`);
          await client.invalidateQueries({ queryKey: meKey });
          void navigate('/');
        }}
      />
    </Page>
  );
}
