import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { UnconfirmedLine } from '../features/accounts/components/unconfirmed-line';
import { useMe } from '../features/accounts/hooks/use-me';
import { useRenewMe } from '../features/accounts/hooks/use-renew-me';
import { CreateCircleForm } from '../features/circles/components/create-circle-form';
import { Button } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import styles from './home.module.css';

/** My circles; for somebody without one, the form to make the first. */
export function HomePage() {
  const me = useMe().data;
  const renewMe = useRenewMe();
  const navigate = useNavigate();
  const [making, setMaking] = useState(false);
  const circles = me?.circles ?? [];
  const first = circles.length === 0;

  return (
    <Page narrow>
      {me && !me.user.confirmed ? <UnconfirmedLine email={me.user.email} /> : null}
      <PageHeading
        title={first ? 'Make your first circle' : 'Your circles'}
        about={
          first
            ? 'A circle is the people you play with: its tunes, its evenings, its record. To join one that exists, ask its host to add your e-mail address.'
            : undefined
        }
      >
        {first || making ? null : (
          <Button look="outline" onClick={() => setMaking(true)}>
            Make a circle
          </Button>
        )}
      </PageHeading>
      {first ? null : (
        <ul className={styles.circles}>
          {circles.map((circle) => (
            <li key={circle.id}>
              <Link to={`/c/${circle.id}/evenings`}>
                <b>{circle.name}</b>
                <span>{circle.role}</span>
              </Link>
            </li>
          ))}
        </ul>
      )}
      {first || making ? (
        <section className={first ? undefined : styles.make}>
          {first ? null : <h2>A new circle</h2>}
          <CreateCircleForm
            onCreated={async (circle) => {
              await renewMe();
              await navigate(`/c/${circle.id}/evenings`);
            }}
          />
        </section>
      ) : null}
    </Page>
  );
}
