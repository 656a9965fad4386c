import { useEffect, useState } from 'react';

/** The time in ms, renewed every `everyMs` while the page is open. */
export function useClock(everyMs: number): number {
  const [now, setNow] = useState(Date.now);
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), everyMs);
    return () => clearInterval(timer);
  }, [everyMs]);
  return now;
}
