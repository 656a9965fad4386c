import { useEffect, useRef, useState } from 'react';

/**
 * What is being typed, handed on when the typing pauses. A value that changes from outside (another
 * address, "clear") replaces the draft.
 * @param ms how long the pause is, in milliseconds
 */
export function useDraft(
  value: string,
  onCommit: (value: string) => void,
  ms = 300,
): readonly [draft: string, type: (text: string) => void] {
  const [draft, setDraft] = useState(value);
  const [seen, setSeen] = useState(value);
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined);
  if (value !== seen) {
    setSeen(value);
    setDraft(value);
  }
  useEffect(() => () => clearTimeout(timer.current), []);
  const type = (text: string) => {
    setDraft(text);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => onCommit(text), ms);
  };
  return [draft, type];
}
