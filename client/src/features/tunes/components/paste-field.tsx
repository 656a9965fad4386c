import { IMPORT_MAX_BYTES } from '@pegwell/shared/contract/tunes';
import { useState } from 'react';
import { Button } from '../../../ui/button';
import { TextAreaField } from '../../../ui/fields';

interface PasteFieldProps {
  readonly error?: string | undefined;
  readonly busy: boolean;
  /** While an import is written nothing else is read. */
  readonly disabled: boolean;
  readonly onPaste: (text: string) => void;
}

/** A place for a list out of a mail or a chat: no file needed. */
export function PasteField({ error, busy, disabled, onPaste }: PasteFieldProps) {
  const [text, setText] = useState('');
  const [missing, setMissing] = useState(false);
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        setMissing(text.trim() === '');
        if (text.trim() !== '' && !busy && !disabled) onPaste(text);
      }}
    >
      <TextAreaField
        label="Or paste a list"
        hint="One tune a line, with its key: June Apple (A). Cells of a spreadsheet and ABC are read too."
        rows={5}
        maxLength={IMPORT_MAX_BYTES}
        value={text}
        error={missing ? 'Nothing is pasted yet.' : error}
        onChange={({ target }) => {
          setText(target.value);
          setMissing(false);
        }}
      />
      <Button type="submit" look="outline" busy={busy && 'Reading'} disabled={disabled}>
        Read the list
      </Button>
    </form>
  );
}
