import { useId, useState } from 'react';
import type { ReactNode } from 'react';
import { bytesOf } from '../lib/format';
import styles from './file-field.module.css';

interface FileFieldProps {
  readonly label: string;
  readonly hint: ReactNode;
  /** File endings that the chooser offers: ".csv,.abc". A dropped file may be anything. */
  readonly accept: string;
  readonly file: File | null;
  readonly error?: string | undefined;
  /** While a file is under way no other is taken. */
  readonly disabled?: boolean;
  readonly onFile: (file: File) => void;
}

/** A place to drop one file, or to choose it. The chosen file stays named here whatever becomes of it. */
export function FileField({ label, hint, accept, file, error, disabled = false, onFile }: FileFieldProps) {
  const id = useId();
  const [over, setOver] = useState(false);
  return (
    <div
      className={`${styles.place} ${over ? styles.over : ''} ${error ? styles.wrong : ''}`}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setOver(false);
        const dropped = event.dataTransfer.files[0];
        if (dropped && !disabled) onFile(dropped);
      }}
    >
      <input
        id={id}
        type="file"
        className={styles.input}
        accept={accept}
        aria-describedby={`${id}-hint ${id}-error`}
        aria-invalid={Boolean(error)}
        disabled={disabled}
        onChange={(event) => {
          const chosen = event.target.files?.[0];
          // Emptied, so that the same file can be chosen again after it was mended.
          event.target.value = '';
          if (chosen) onFile(chosen);
        }}
      />
      <label htmlFor={id} className={styles.label}>
        {label}
      </label>
      <span className={styles.or}>or drop it here</span>
      <p id={`${id}-hint`} className={styles.hint}>
        {hint}
      </p>
      {file ? (
        <p className={styles.chosen}>
          <b>{file.name}</b> {bytesOf(file.size)}
        </p>
      ) : null}
      <div id={`${id}-error`} role="alert" className={styles.error}>
        {error}
      </div>
    </div>
  );
}
