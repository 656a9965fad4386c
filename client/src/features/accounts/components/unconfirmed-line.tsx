import { useMutation } from '@tanstack/react-query';
import { sentenceOf } from '../../../lib/problem';
import { Button } from '../../../ui/button';
import { useSay } from '../../../ui/status';
import { confirmAgain } from '../api/links';
import { useMailState } from '../hooks/use-mail-state';
import styles from './unconfirmed-line.module.css';

/** Says that an address waits to be confirmed; nothing on a server that sends no mail. */
export function UnconfirmedLine({ email }: { readonly email: string }) {
  const say = useSay();
  const mail = useMailState();
  const again = useMutation({
    mutationFn: confirmAgain,
    onSuccess: () => say(`A new mail is on its way to ${email}.`),
    onError: (error) => say(sentenceOf(error)),
  });
  if (!mail.data?.sends) return null;
  return (
    <p className={styles.line}>
      <span>
        <b>{email}</b> is not confirmed yet: press the link in our mail to it.
      </span>
      <Button look="plain" busy={again.isPending && 'Sending it'} onClick={() => again.mutate()}>
        Send it again
      </Button>
    </p>
  );
}
