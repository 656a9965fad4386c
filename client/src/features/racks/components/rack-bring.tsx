import type { Rack, RackPlan } from '@pegwell/shared/contract/racks';
import { cautions } from '@pegwell/shared/music/caution';
import { standardPitches, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { retuneWords } from '@pegwell/shared/music/words';
import { TuningText } from '../../../pictures/tuning-text';
import { arrivalWords, tunedText } from '../rack-words';
import { InstrumentBadge } from './instrument-badge';
import styles from './racks.module.css';

interface RackBringProps {
  readonly kind: InstrumentKind;
  readonly rack: Rack;
  readonly plan: RackPlan;
}

/** How each instrument is tuned when its player comes. */
export function RackBring({ kind, rack, plan }: RackBringProps) {
  const played = new Set(plan.tunes.map(({ instrument }) => instrument));
  return (
    <section className={styles.bring} aria-labelledby={`bring-${rack.id}`}>
      <h3 id={`bring-${rack.id}`}>Before you come</h3>
      <ul>
        {rack.instruments.map((instrument, index) => {
          const tuned = plan.bring[index] ?? null;
          const needed = played.has(index);
          const home = needed && tuned?.pitches && instrument.tuning === null ? tuned.pitches : null;
          return (
            <li key={index} data-needed={needed}>
              <InstrumentBadge instrument={index} state={needed ? 'hand' : 'rest'} name={kind.name} />
              {tuned ? <TuningText className={styles.letters ?? ''} text={tunedText(tuned)} /> : null}
              <p>{arrivalWords(instrument, needed, tuned)}</p>
              {home ? <FromStandard kind={kind} to={home} /> : null}
            </li>
          );
        })}
      </ul>
    </section>
  );
}

/** What is turned at home, from standard: where it stands now only its player knows. */
function FromStandard({ kind, to }: { readonly kind: InstrumentKind; readonly to: readonly string[] }) {
  const words = retuneWords(kind, standardPitches(kind), to);
  if (words === '') return null;
  return (
    <div className={styles.home}>
      <p>{`From standard: ${words}.`}</p>
      {cautions(kind, null, to).map(({ courseIndex, grade, sentence }) => (
        <p key={courseIndex} data-grade={grade}>
          {sentence}
        </p>
      ))}
    </div>
  );
}
