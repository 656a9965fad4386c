import { useEffect } from 'react';

/** Whether this browser gives pages the means to keep the screen awake (only on HTTPS and on this machine). */
export const canStayAwake = (): boolean => 'wakeLock' in navigator;

/** Keeps the screen awake while the page is looked at, where the browser allows it. */
export function useWakeLock(): void {
  useEffect(() => {
    if (!canStayAwake()) return undefined;
    let lock: WakeLockSentinel | null = null;
    let left = false;
    const hold = async () => {
      if (document.visibilityState !== 'visible') return;
      try {
        const held = await navigator.wakeLock.request('screen');
        if (left) await held.release();
        else lock = held;
      } catch {
        // A low battery or a setting forbids it: the player has to touch the screen now and then.
      }
    };
    void hold();
    // The browser lets go of it whenever the page is hidden.
    const again = () => void hold();
    document.addEventListener('visibilitychange', again);
    return () => {
      left = true;
      document.removeEventListener('visibilitychange', again);
      void lock?.release().catch(() => undefined);
    };
  }, []);
}
