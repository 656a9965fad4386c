import { useEffect } from 'react';

/** Ctrl-Z and Ctrl-Shift-Z or Ctrl-Y (Command on a Mac), except where text is typed or a dialog is open. */
export function useUndoKeys(undo: () => void, redo: () => void, active: boolean): void {
  useEffect(() => {
    if (!active) return undefined;
    const onKey = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
      const target = event.target instanceof Element ? event.target : null;
      if (target?.closest('input, textarea, select, [role=dialog]')) return;
      const key = event.key.toLowerCase();
      if (key !== 'z' && key !== 'y') return;
      event.preventDefault();
      if (key === 'y' || event.shiftKey) redo();
      else undo();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [undo, redo, active]);
}
