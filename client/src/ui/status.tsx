import { createContext, useCallback, useContext, useEffect, useMemo, useState } from 'react';
import type { ReactNode } from 'react';
import styles from './status.module.css';

interface Said {
  readonly sentence: string;
  readonly action?: { readonly label: string; readonly onPress: () => void };
  readonly at: number;
}

/** Says one sentence at the foot of the page, and to screen readers: "Taken out. Undo". */
export type Say = (sentence: string, action?: Said['action']) => void;

const SayContext = createContext<Say>(() => undefined);

export const useSay = (): Say => useContext(SayContext);

/** Long enough to read and to reach the button; a sentence with something to press stays longer. */
const staysMs = (said: Said) => (said.action ? 12_000 : 5_000);

/** Holds the one live region. What went wrong in a form belongs beside its field, not here. */
export function StatusProvider({ children }: { readonly children: ReactNode }) {
  const [said, setSaid] = useState<Said | null>(null);
  const say = useCallback<Say>(
    (sentence, action) => setSaid({ sentence, at: Date.now(), ...(action ? { action } : {}) }),
    [],
  );

  useEffect(() => {
    if (!said) return undefined;
    const timer = setTimeout(() => setSaid(null), staysMs(said));
    return () => clearTimeout(timer);
  }, [said]);

  const bar = useMemo(
    () => (
      <div className={styles.place} role="status">
        {said ? (
          <div className={styles.said} key={said.at}>
            <span>{said.sentence}</span>
            {said.action ? (
              <button
                type="button"
                onClick={() => {
                  said.action?.onPress();
                  setSaid(null);
                }}
              >
                {said.action.label}
              </button>
            ) : null}
            <button type="button" aria-label="Put this message away" onClick={() => setSaid(null)}>
              ✕
            </button>
          </div>
        ) : null}
      </div>
    ),
    [said],
  );

  return (
    <SayContext.Provider value={say}>
      {children}
      {bar}
    </SayContext.Provider>
  );
}
