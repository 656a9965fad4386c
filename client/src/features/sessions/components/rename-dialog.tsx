import { useState } from 'react';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { TextField } from '../../../ui/fields';

interface RenameDialogProps {
  readonly title: string;
  readonly onRename: (title: string) => void;
  readonly onClose: () => void;
}

const LONGEST = 120;

export function RenameDialog({ title, onRename, onClose }: RenameDialogProps) {
  const [text, setText] = useState(title);
  const [problem, setProblem] = useState<string | undefined>(undefined);
  const rename = () => {
    const name = text.trim();
    if (name === '') setProblem('A set needs a name.');
    else if (name.length > LONGEST) setProblem(`At most ${LONGEST} characters.`);
    else onRename(name);
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Rename ${title}`}
      actions={
        <>
          <Button onClick={rename}>Rename</Button>
          <Button look="outline" onClick={onClose}>
            Leave it
          </Button>
        </>
      }
    >
      <form
        onSubmit={(event) => {
          event.preventDefault();
          rename();
        }}
      >
        <TextField
          label="Name of the set"
          value={text}
          error={problem}
          onChange={(event) => setText(event.target.value)}
        />
      </form>
    </Dialog>
  );
}
