import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useMe } from '../features/accounts/hooks/use-me';
import { getMembers, membersKey } from '../features/circles/api/members';
import { AddMemberForm } from '../features/circles/components/add-member-form';
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
  const members = useQuery({
    queryKey: membersKey(circle.id),
    queryFn: ({ signal }) => getMembers(circle.id, signal),
  });
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
        <MemberList members={members.data.items} ownId={me?.user.id} />
      ) : (
        <Loading what="the people" />
      )}
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
    </Page>
  );
}
