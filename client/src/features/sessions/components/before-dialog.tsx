import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, type Board } from '@pegwell/shared/session/board';
import { useState } from 'react';
import { entryTitle } from '../../../music/entry-title';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { SelectField } from '../../../ui/fields';

interface BeforeDialogProps {
  readonly board: Board<ShownEntry>;
  readonly entry: ShownEntry;
  readonly onSave: (other: ShownEntry) => void;
  readonly onClose: () => void;
}

/** Asks which tune another must come before, wherever an order puts them. */
export function BeforeDialog({ board, entry, onSave, onClose }: BeforeDialogProps) {
  const others = entriesOf(board)
    .map((other, index) => ({ other, number: index + 1 }))
    .filter(({ other }) => other.id !== entry.id);
  const [chosen, setChosen] = useState('');
  const [problem, setProblem] = useState<string | undefined>(undefined);
  const save = () => {
    const found = others.find(({ other }) => other.id === chosen);
    if (found) onSave(found.other);
    else setProblem('Choose a tune.');
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`${entryTitle(entry)} must come before`}
      actions={
        <>
          <Button onClick={save}>Keep it so</Button>
          <Button look="outline" onClick={onClose}>
            Leave it
          </Button>
        </>
      }
    >
      <SelectField
        label="A tune of this evening"
        value={chosen}
        error={problem}
        onChange={(event) => setChosen(event.target.value)}
      >
        <option value="">Choose a tune</option>
        {others.map(({ other, number }) => (
          <option key={other.id} value={other.id}>
            {number} {entryTitle(other)}
          </option>
        ))}
      </SelectField>
    </Dialog>
  );
}
