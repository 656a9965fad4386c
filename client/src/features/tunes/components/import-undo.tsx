import type { ImportUndone } from '@pegwell/shared/contract/tunes';
import { count } from '../../../lib/format';
import { Button } from '../../../ui/button';

interface ImportUndoProps {
  readonly undone: ImportUndone | undefined;
  readonly busy: boolean;
  readonly error: string | undefined;
  readonly onUndo: () => void;
}

/** Takes an import back as one step, and lists what stays because somebody changed it since. */
export function ImportUndo({ undone, busy, error, onUndo }: ImportUndoProps) {
  if (!undone) {
    return (
      <div>
        <Button look="outline" busy={busy && 'Undoing'} onClick={onUndo}>
          Undo this import
        </Button>
        <div role="alert">{error}</div>
      </div>
    );
  }
  const { removed, restored, kept } = undone;
  return (
    <div role="status">
      <p>
        <b>{`Undone: ${count(removed, 'tune')} taken out, ${restored} as before.`}</b>
      </p>
      {kept.length > 0 ? (
        <>
          <p>{`${count(kept.length, 'tune')} changed since then and kept:`}</p>
          <ul>
            {kept.map(({ id, title }) => (
              <li key={id}>{title}</li>
            ))}
          </ul>
        </>
      ) : null}
    </div>
  );
}
