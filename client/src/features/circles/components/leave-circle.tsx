import { useState } from 'react';
import { sentenceOf } from '../../../lib/problem';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { FormProblems } from '../../../ui/fields';

interface LeaveCircleProps {
  readonly name: string;
  readonly onLeave: () => Promise<void>;
}

/** Asks first: only a host lets somebody in again. */
export function LeaveCircle({ name, onLeave }: LeaveCircleProps) {
  const [asking, setAsking] = useState(false);
  const [leaving, setLeaving] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const close = () => {
    setAsking(false);
    setProblem(null);
  };
  const leave = async () => {
    setLeaving(true);
    try {
      await onLeave();
    } catch (error) {
      setProblem(sentenceOf(error));
      setLeaving(false);
    }
  };
  return (
    <>
      <Button look="plain" onClick={() => setAsking(true)}>
        Leave the circle
      </Button>
      <Dialog
        open={asking}
        onClose={close}
        title={`Leave ${name}?`}
        about="You find nothing of it any more; what you did stays. A host can add you again."
        actions={
          <>
            <Button look="danger" busy={leaving && 'Leaving'} onClick={() => void leave()}>
              Leave
            </Button>
            <Button look="outline" onClick={close}>
              Stay
            </Button>
          </>
        }
      >
        {problem === null ? null : <FormProblems problems={[problem]} />}
      </Dialog>
    </>
  );
}
