import { useState } from 'react';
import { Button, type ButtonLook } from './button';
import { useSay } from './status';

interface CopyButtonProps {
  readonly text: string;
  /** "Copy the code" */
  readonly label: string;
  /** What was copied, to be said: "The code". */
  readonly what: string;
  readonly look?: ButtonLook;
}

/** Puts a text on the clipboard; where the browser withholds that (plain HTTP), shows it to be copied by hand. */
export function CopyButton({ text, label, what, look = 'plain' }: CopyButtonProps) {
  const say = useSay();
  const [byHand, setByHand] = useState(false);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      say(`${what} is copied.`);
    } catch {
      setByHand(true);
    }
  };
  if (byHand)
    return (
      <input
        readOnly
        autoFocus
        aria-label={label}
        value={text}
        style={{
          border: '1.5px solid var(--ink-2)',
          minHeight: 'var(--touch)',
          padding: '0 10px',
          width: '16rem',
        }}
        onFocus={(event) => event.target.select()}
      />
    );
  return (
    <Button look={look} onClick={() => void copy()}>
      {label}
    </Button>
  );
}
