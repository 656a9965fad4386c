import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { ResetForm } from '../features/accounts/components/reset-form';
import { useLinkToken } from '../features/accounts/hooks/use-link-token';
import { useSignedOut } from '../features/accounts/hooks/use-signed-out';
import { LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import styles from './mailed-page.module.css';
import { usePageTurned } from './use-page-turned';

/** Where the link in a mail about a forgotten password leads. */
export function ResetPage() {
  const token = useLinkToken();
  const signedOut = useSignedOut();
  const navigate = useNavigate();
  const [done, setDone] = useState(false);
  usePageTurned(done);
  if (done) {
    return (
      <Page narrow>
        <PageHeading title="Your password is the new one" />
        <p>All sign-ins have ended. Sign in with the new password.</p>
        <div className={styles.do}>
          <LinkButton to="/sign-in">Sign in</LinkButton>
        </div>
      </Page>
    );
  }
  return (
    <Page narrow>
      <PageHeading
        title="Choose a new password"
        about={token ? 'It ends all your sign-ins.' : 'The link is not whole. Open it again from the mail.'}
      />
      {token ? (
        <div className={styles.form}>
          <ResetForm
            token={token}
            onReset={() => {
              signedOut();
              setDone(true);
              // Without the link, which is used up.
              void navigate('/reset', { replace: true });
            }}
          />
        </div>
      ) : null}
      <div className={styles.do}>
        <LinkButton to="/forgot" look="quiet">
          Ask for another mail
        </LinkButton>
      </div>
    </Page>
  );
}
