import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { midiOf, noteOf } from '@pegwell/shared/music/pitch';
import type { Tuned } from '@pegwell/shared/music/tuning';
import { pegNameInFull } from '@pegwell/shared/music/words';
import { Button } from '../../../ui/button';
import { frequencyOfString } from '../frequency';
import type { OwnStrings } from '../hooks/use-own-strings';
import { canSound, sound } from '../tone';
import styles from './retune-card.module.css';

interface AllStringsProps {
  readonly kind: InstrumentKind;
  readonly to: Tuned;
  readonly referenceA: number;
  readonly strings: OwnStrings;
}

/** Every string with the note it should have, to be heard one by one. A capo raises what is heard. */
export function AllStrings({ kind, to, referenceA, strings }: AllStringsProps) {
  return (
    <ul className={styles.strings}>
      {kind.courses.map(({ ordinal }, index) => {
        const pitch = to.pitches[index];
        if (pitch === undefined) return null;
        const name = pegNameInFull(kind, index);
        const frequency = frequencyOfString(midiOf(pitch) + to.capo, referenceA, strings);
        return (
          <li key={ordinal}>
            <span>{name}</span>
            <b>{noteOf(pitch)}</b>
            {canSound() ? (
              <Button
                look="plain"
                onClick={() => sound(frequency, 'plucked')}
                aria-label={`Hear the ${name}`}
              >
                Hear
              </Button>
            ) : null}
          </li>
        );
      })}
    </ul>
  );
}
