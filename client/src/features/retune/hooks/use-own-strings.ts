import { useCallback, useState } from 'react';

const KEY = 'pegwell-strings';

export interface OwnStrings {
  readonly leftHanded: boolean;
  readonly gut: boolean;
  /** Fifths pure from A instead of equal steps. */
  readonly pureFifths: boolean;
}

function remembered(): OwnStrings {
  let kept: Partial<Record<keyof OwnStrings, unknown>> = {};
  try {
    kept = (JSON.parse(localStorage.getItem(KEY) ?? '') ?? {}) as typeof kept;
  } catch {
    // Nothing kept, or storage is closed to pages.
  }
  return {
    leftHanded: kept.leftHanded === true,
    gut: kept.gut === true,
    pureFifths: kept.pureFifths === true,
  };
}

/** What only the player knows of the instrument in hand, kept on this device. */
export function useOwnStrings(): readonly [OwnStrings, (change: Partial<OwnStrings>) => void] {
  const [strings, setStrings] = useState(remembered);
  const change = useCallback((change: Partial<OwnStrings>) => {
    setStrings((before) => {
      const next = { ...before, ...change };
      try {
        localStorage.setItem(KEY, JSON.stringify(next));
      } catch {
        // Not kept then; it still holds until the page is closed.
      }
      return next;
    });
  }, []);
  return [strings, change];
}
