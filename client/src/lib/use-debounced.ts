import { useEffect, useState } from 'react';

/** The value once it has stood still for `ms` milliseconds; at first, and when empty, at once. */
export function useDebounced(value: string, ms: number): string {
  const [still, setStill] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setStill(value), ms);
    return () => clearTimeout(timer);
  }, [value, ms]);
  return value === '' ? '' : still;
}
