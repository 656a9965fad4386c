import { useState } from 'react';
import type { Session } from '@pegwell/shared/contract/sessions';
import { sentenceOf } from '../../../lib/problem';
import { Dialog } from '../../../ui/dialog';
import { Button, LinkButton } from '../../../ui/button';
import { useSay } from '../../../ui/status';
import styles from './dialogs.module.css';

interface FollowDialogProps {
  readonly session: Pick<Session, 'code' | 'can'>;
  readonly onNewCode: () => Promise<void>;
  readonly onClose: () => void;
}

/** The code that players type or scan, and the address behind it. */
export function FollowDialog({ session, onNewCode, onClose }: FollowDialogProps) {
  const say = useSay();
  const [asking, setAsking] = useState<'no' | 'asked' | 'doing'>('no');
  const path = `/f/${session.code}`;
  const address = `${location.origin}${path}`;
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(address);
      say('The address is copied.');
    } catch {
      // Withheld without HTTPS: the address stands there to be copied by hand.
      say('Copying is not allowed here. Mark the address and copy it.');
    }
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title="Follow this evening"
      about="Anyone with this code follows on a phone, each for their own instrument. No account is needed."
      actions={
        <>
          <Button onClick={() => void copy()}>Copy the address</Button>
          <LinkButton look="outline" to={path}>
            Open it here
          </LinkButton>
          <LinkButton look="outline" to={`${path}/room`}>
            One screen for the room
          </LinkButton>
        </>
      }
    >
      <p className={styles.code}>{session.code}</p>
      <p className={styles.about}>{address}</p>
      {session.can.includes('sessions.change') ? (
        asking === 'no' ? (
          <Button look="plain" onClick={() => setAsking('asked')}>
            Give it another code
          </Button>
        ) : (
          <div className={styles.form}>
            <p>Phones that follow by the old code, and sheets that show it, stop working.</p>
            <div>
              <Button
                look="danger"
                busy={asking === 'doing' && 'Changing'}
                onClick={() => {
                  setAsking('doing');
                  onNewCode()
                    .then(
                      () => say('The evening has another code.'),
                      (error: unknown) => say(sentenceOf(error)),
                    )
                    .finally(() => setAsking('no'));
                }}
              >
                Change the code
              </Button>
            </div>
          </div>
        )
      ) : null}
    </Dialog>
  );
}
