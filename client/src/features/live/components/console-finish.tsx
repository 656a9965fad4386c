import type { LiveAction } from '@pegwell/shared/contract/live';
import { useState } from 'react';
import { count } from '../../../lib/format';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';

interface ConsoleFinishProps {
  /** Tunes that were not called. */
  readonly left: number;
  readonly taking: LiveAction | null;
  readonly onFinish: () => Promise<void>;
}

/** Asks first: a finished evening takes no more steps. */
export function ConsoleFinish({ left, taking, onFinish }: ConsoleFinishProps) {
  const [asking, setAsking] = useState(false);
  const close = () => setAsking(false);
  return (
    <>
      <Button
        look="plain"
        aria-label="Finish the evening"
        disabled={taking !== null}
        onClick={() => setAsking(true)}
      >
        Finish
      </Button>
      <Dialog
        open={asking}
        onClose={close}
        title="Finish the evening?"
        about={`${left > 0 ? `${count(left, 'tune')} on the board ${left === 1 ? 'was' : 'were'} not called. ` : ''}Phones say good night. A finished evening takes no more steps.`}
        actions={
          <>
            <Button busy={taking === 'finish' && 'Finishing'} onClick={() => void onFinish().then(close)}>
              Finish
            </Button>
            <Button look="outline" onClick={close}>
              Play on
            </Button>
          </>
        }
      />
    </>
  );
}
