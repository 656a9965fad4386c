import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, standingOf, type Board } from '@pegwell/shared/session/board';
import { useState } from 'react';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { TextField } from '../../../ui/fields';
import { entryTitle } from '../../../music/entry-title';

interface PositionDialogProps {
  readonly board: Board<ShownEntry>;
  readonly entry: ShownEntry;
  /** The first number that may be taken. */
  readonly first: number;
  readonly onMove: (position: number) => void;
  readonly onClose: () => void;
}

/** Asks for the number that a tune should have in the evening. */
export function PositionDialog({ board, entry, first, onMove, onClose }: PositionDialogProps) {
  const last = entriesOf(board).length;
  const [text, setText] = useState(String((standingOf(board, entry.id)?.position ?? 0) + 1));
  const [problem, setProblem] = useState<string | undefined>(undefined);
  const move = () => {
    const number = Number(text);
    if (!Number.isInteger(number) || number < first || number > last) {
      setProblem(`A whole number from ${first} to ${last}.`);
    } else onMove(number - 1);
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Where should ${entryTitle(entry)} stand?`}
      actions={
        <>
          <Button onClick={move}>Move it there</Button>
          <Button look="outline" onClick={onClose}>
            Leave it
          </Button>
        </>
      }
    >
      <form
        onSubmit={(event) => {
          event.preventDefault();
          move();
        }}
      >
        <TextField
          label="Number in the evening"
          inputMode="numeric"
          value={text}
          error={problem}
          onChange={(event) => setText(event.target.value)}
        />
      </form>
    </Dialog>
  );
}
