import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { Link } from 'react-router-dom';
import type { Light } from '../../../theme/light';
import { Button } from '../../../ui/button';
import { canStayAwake } from '../hooks/use-wake-lock';
import styles from './follow.module.css';

interface FollowFootProps {
  /** Null where there is no such evening. */
  readonly code: string | null;
  readonly kind: InstrumentKind | null;
  /** Hz; null while it is not known. */
  readonly referenceA: number | null;
  readonly light: Light;
  readonly onLight: (light: Light) => void;
  readonly onInstrument: () => void;
}

/** What can be changed on this phone, and what the room tunes to. */
export function FollowFoot({ code, kind, referenceA, light, onLight, onInstrument }: FollowFootProps) {
  return (
    <footer className={styles.foot}>
      <div className={styles.buttons}>
        {kind ? (
          <Button look="outline" onClick={onInstrument}>
            {`${kind.name}, change`}
          </Button>
        ) : null}
        <Button look="outline" onClick={() => onLight(light === 'lamp' ? 'day' : 'lamp')}>
          {light === 'lamp' ? 'Day light' : 'Lamp light'}
        </Button>
      </div>
      {code === null ? null : (
        <p className={styles.facts}>
          {referenceA === null ? null : <span>{`A = ${referenceA} Hz`}</span>}
          <span>{`code ${spaced(code)}`}</span>
          <Link to={`/f/${code}/room`}>Screen for the room</Link>
        </p>
      )}
      {canStayAwake() ? null : (
        <p className={styles.asleep}>
          Here the browser lets the screen go dark. Set it to stay on for the evening.
        </p>
      )}
    </footer>
  );
}

/** `QGQE 34ES`: in two halves, as people read it out. */
export const spaced = (code: string): string => `${code.slice(0, 4)} ${code.slice(4)}`;
