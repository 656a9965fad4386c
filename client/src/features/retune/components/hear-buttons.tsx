import { useEffect, useRef, useState } from 'react';
import { Button } from '../../../ui/button';
import { canSound, sound } from '../tone';
import styles from './retune-card.module.css';

interface HearButtonsProps {
  readonly note: string;
  /** Hertz. */
  readonly frequency: number;
}

/** The string's pitch, plucked, or held for as long as it takes. Nothing where the browser makes no sound. */
export function HearButtons({ note, frequency }: HearButtonsProps) {
  const stop = useRef<(() => void) | null>(null);
  const [holds, setHolds] = useState(false);
  useEffect(() => () => stop.current?.(), []);
  if (!canSound()) return null;
  const play = (form: 'plucked' | 'steady') => {
    stop.current?.();
    stop.current = sound(frequency, form);
    setHolds(form === 'steady');
  };
  const end = () => {
    stop.current?.();
    stop.current = null;
    setHolds(false);
  };
  return (
    <div className={styles.hear}>
      <Button look="outline" onClick={() => play('plucked')}>{`Hear ${note}`}</Button>
      <Button look="outline" aria-pressed={holds} onClick={holds ? end : () => play('steady')}>
        {holds ? `Stop ${note}` : `Hold ${note}`}
      </Button>
    </div>
  );
}
