import { useEffect } from 'react';

/** When a page becomes another under the same address, the reading starts at its beginning, as after a change of page. */
export function usePageTurned(turned: boolean): void {
  useEffect(() => {
    if (turned) document.getElementById('main')?.focus({ preventScroll: true });
  }, [turned]);
}
