import { useMutation } from '@tanstack/react-query';
import { confirmAddress } from '../features/accounts/api/links';
import { useLinkToken } from '../features/accounts/hooks/use-link-token';
import { useRenewMe } from '../features/accounts/hooks/use-renew-me';
import { sentenceOf } from '../lib/problem';
import { Button, LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import styles from './mailed-page.module.css';
import { usePageTurned } from './use-page-turned';

/** Where the link in a mail about an address leads. It takes a press: programs that look at links confirm nothing. */
export function ConfirmPage() {
  const token = useLinkToken();
  const renewMe = useRenewMe();
  const confirm = useMutation({ mutationFn: () => confirmAddress(token), onSuccess: renewMe });
  usePageTurned(confirm.isSuccess);
  if (confirm.data) {
    return (
      <Page narrow>
        <PageHeading title="Your address is confirmed" />
        <p>
          Mail to <b>{confirm.data.email}</b> reaches you.
        </p>
        <div className={styles.do}>
          <LinkButton to="/">To your circles</LinkButton>
        </div>
      </Page>
    );
  }
  return (
    <Page narrow>
      <PageHeading
        title="Confirm your address"
        about={
          token
            ? 'One press, and we know that mail reaches you.'
            : 'The link is not whole. Open it again from the mail.'
        }
      />
      <div role="alert">
        {confirm.isError ? <p className={styles.refused}>{sentenceOf(confirm.error)}</p> : null}
      </div>
      <div className={styles.do}>
        {token ? (
          <Button busy={confirm.isPending && 'Confirming it'} onClick={() => confirm.mutate()}>
            Confirm this address
          </Button>
        ) : null}
        <LinkButton to="/account" look="quiet">
          To your account
        </LinkButton>
      </div>
    </Page>
  );
}
