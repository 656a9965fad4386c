import { useState } from 'react';
import { ForgotForm } from '../features/accounts/components/forgot-form';
import { useMailState } from '../features/accounts/hooks/use-mail-state';
import { Button, LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import { Failing, Loading } from '../ui/states';
import styles from './mailed-page.module.css';
import { usePageTurned } from './use-page-turned';

/** For somebody who forgot the password: a link by mail. */
export function ForgotPage() {
  const mail = useMailState();
  const [asked, setAsked] = useState<string | null>(null);
  usePageTurned(asked !== null);
  if (asked) {
    return (
      <Page narrow>
        <PageHeading title="Look at your mail" />
        <p>
          If an account has the address <b>{asked}</b>, a mail is on its way. The link in it works once, for
          one hour.
        </p>
        <p className={styles.quiet}>Nothing after a few minutes? Look among the unwanted mail.</p>
        <div className={styles.do}>
          <Button look="outline" onClick={() => setAsked(null)}>
            Another address
          </Button>
        </div>
      </Page>
    );
  }
  return (
    <Page narrow>
      <PageHeading
        title="Forgot your password?"
        about={mail.data?.sends ? 'We send you a link with which you choose a new one.' : undefined}
      />
      {mail.data?.sends ? (
        <div className={styles.form}>
          <ForgotForm onAsked={setAsked} />
        </div>
      ) : mail.data ? (
        <p>This server sends no mail. Ask whoever runs it for a new password.</p>
      ) : mail.isError ? (
        <Failing title="Pegwell did not answer" error={mail.error} onRetry={() => void mail.refetch()} />
      ) : (
        <Loading what="the page" />
      )}
      <div className={styles.do}>
        <LinkButton to="/sign-in" look="quiet">
          Back to signing in
        </LinkButton>
      </div>
    </Page>
  );
}
