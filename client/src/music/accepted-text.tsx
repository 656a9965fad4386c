import type { ShownTuning } from '@pegwell/shared/contract/tunes';
import { Fragment } from 'react';
import { TuningText } from '../pictures/tuning-text';
import styles from './music.module.css';

/** A tuning with its capo, as it is typed and read back: `gDGBD capo 2`. */
function tunedText({ tuning, capo }: Pick<ShownTuning, 'tuning' | 'capo'>): string {
  return capo === 0 ? tuning : `${tuning} capo ${capo}`;
}

interface AcceptedTextProps {
  /** First choice first. */
  readonly accepted: readonly Pick<ShownTuning, 'tuning' | 'capo'>[];
  /** From the circle's usual tunings: set lighter, and said so to a screen reader. */
  readonly assumed?: boolean;
}

/** What a kind accepts: `AEAE or GDAE`, or "as it stands". */
export function AcceptedText({ accepted, assumed = false }: AcceptedTextProps) {
  return (
    <span className={assumed ? styles.assumed : undefined}>
      {accepted.map((tuned, rank) => (
        <Fragment key={tunedText(tuned)}>
          {rank > 0 ? <span className={styles.or}> or </span> : null}
          {tuned.tuning === 'any' ? (
            <span className={styles.any}>as it stands</span>
          ) : (
            <TuningText text={tunedText(tuned)} />
          )}
        </Fragment>
      ))}
      {assumed ? <span className="visually-hidden"> assumed</span> : null}
    </span>
  );
}
