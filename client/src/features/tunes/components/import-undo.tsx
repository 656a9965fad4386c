import { count } from '../../../lib/format';
import { Button } from '../../../ui/button';
import { useUndoImport } from '../hooks/use-undo-import';
import styles from './import-undo.module.css';

interface ImportUndoProps {
  readonly circleId: string;
  readonly importId: string;
}

/** Takes an import back, and lists what stays because somebody changed it since. */
export function ImportUndo({ circleId, importId }: ImportUndoProps) {
  const { undo, busy, undone, error } = useUndoImport(circleId, importId);
  if (!undone) {
    return (
      <div>
        <Button look="outline" busy={busy && 'Undoing'} onClick={undo}>
          Undo this import
        </Button>
        <div role="alert" className={styles.error}>
          {error}
        </div>
      </div>
    );
  }
  const { removed, restored, kept } = undone;
  return (
    <div role="status">
      <p className={styles.undone}>{`Undone: ${count(removed, 'tune')} taken out, ${restored} as before.`}</p>
      {kept.length > 0 ? (
        <>
          <p>{`${count(kept.length, 'tune')} changed since then and kept:`}</p>
          <ul className={styles.kept}>
            {kept.map(({ id, title }) => (
              <li key={id}>{title}</li>
            ))}
          </ul>
        </>
      ) : null}
    </div>
  );
}
