import type { SignIn } from '@pegwell/shared/contract/accounts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { momentOf, ownTimeZone } from '../../../lib/format';
import { sentenceOf } from '../../../lib/problem';
import { Button } from '../../../ui/button';
import { Failing, Loading } from '../../../ui/states';
import { useSay } from '../../../ui/status';
import { endOtherSignIns, endSignIn, getSignIns, signInsKey } from '../api/own-account';
import { AccountSection } from './account-section';
import sectionStyles from './account-section.module.css';
import styles from './sign-ins.module.css';

/** Where one is signed in, and an end to any of it. */
export function SignInsSection() {
  const say = useSay();
  const client = useQueryClient();
  const signIns = useQuery({
    queryKey: signInsKey,
    queryFn: ({ signal }) => getSignIns(signal),
    staleTime: 0,
  });
  const end = useMutation({
    mutationFn: (one: SignIn | 'others') => (one === 'others' ? endOtherSignIns() : endSignIn(one.id)),
    onSuccess: (_, one) =>
      say(one === 'others' ? 'All other sign-ins have ended.' : `${one.device} is signed out.`),
    onError: (error) => say(sentenceOf(error)),
    // Also when it failed: it may have been ended from elsewhere.
    onSettled: () => client.invalidateQueries({ queryKey: signInsKey }),
  });
  const items = signIns.data?.items;
  return (
    <AccountSection
      title="Where you are signed in"
      about="End what you do not know, then change the password."
    >
      {items ? (
        <ul className={styles.list}>
          {items.map((one) => (
            <SignInRow key={one.id} signIn={one} onEnd={() => end.mutate(one)} />
          ))}
        </ul>
      ) : signIns.isError ? (
        <Failing
          title="The sign-ins could not be loaded"
          error={signIns.error}
          onRetry={() => void signIns.refetch()}
        />
      ) : (
        <Loading what="your sign-ins" />
      )}
      {items && items.length > 1 ? (
        <div className={sectionStyles.do}>
          <Button look="outline" onClick={() => end.mutate('others')}>
            End all others
          </Button>
        </div>
      ) : null}
    </AccountSection>
  );
}

function SignInRow({ signIn, onEnd }: { readonly signIn: SignIn; readonly onEnd: () => void }) {
  const { device, begunAt, usedAt, here } = signIn;
  const begun = momentOf(begunAt, ownTimeZone());
  const used = momentOf(usedAt, ownTimeZone());
  return (
    <li>
      <span className={styles.words}>
        <b>{device}</b>
        <span>{used === begun ? `since ${begun}` : `since ${begun}; last used ${used}`}</span>
      </span>
      {here ? (
        <span className={styles.here}>this one</span>
      ) : (
        <Button look="plain" aria-label={`End ${device}, since ${begun}`} onClick={onEnd}>
          End
        </Button>
      )}
    </li>
  );
}
