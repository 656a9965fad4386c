import { builtInKind, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { useCallback, useState } from 'react';

const KEY = 'pegwell-instrument';

function remembered(): InstrumentKind | null {
  try {
    return builtInKind(localStorage.getItem(KEY) ?? '') ?? null;
  } catch {
    return null;
  }
}

/** What this device's player plays: chosen once, null until then. */
export function useInstrument(): readonly [InstrumentKind | null, (kind: InstrumentKind | null) => void] {
  const [kind, setKind] = useState(remembered);
  const choose = useCallback((next: InstrumentKind | null) => {
    try {
      if (next) localStorage.setItem(KEY, next.id);
    } catch {
      // Not kept then; it still holds until the page is closed.
    }
    setKind(next);
  }, []);
  return [kind, choose];
}
