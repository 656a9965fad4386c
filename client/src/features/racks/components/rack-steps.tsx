import type { RackPlan, Racks } from '@pegwell/shared/contract/racks';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { TuningText } from '../../../pictures/tuning-text';
import { planSets, type Stretch } from '../plan-sets';
import { InstrumentBadge } from './instrument-badge';
import { RackTurns } from './rack-turns';
import styles from './racks.module.css';

interface RackStepsProps {
  readonly kind: InstrumentKind;
  readonly sets: Racks['evening']['sets'];
  readonly plan: RackPlan;
}

/** The evening as this player goes through it: which instrument for which tunes, and what is turned between. */
export function RackSteps({ kind, sets, plan }: RackStepsProps) {
  return (
    <div className={styles.sets}>
      {planSets(sets, plan).map(({ id, title, steps }) => (
        <section key={id} aria-label={title}>
          <h3>{title}</h3>
          <ol className={styles.steps}>
            {steps.map(({ stretch, turning }) =>
              stretch ? (
                <li key={stretch.tunes[0]?.id}>
                  <Play kind={kind} stretch={stretch} />
                </li>
              ) : (
                <li key={`before ${turning.before.id}`}>
                  <RackTurns kind={kind} turning={turning} />
                </li>
              ),
            )}
          </ol>
        </section>
      ))}
    </div>
  );
}

function Play({ kind, stretch }: { readonly kind: InstrumentKind; readonly stretch: Stretch }) {
  const { instrument, tuned, tunes } = stretch;
  return (
    <div className={styles.play}>
      <InstrumentBadge instrument={instrument} state="hand" name={kind.name} />
      <p className={styles.playLetters}>
        {tuned ? <TuningText text={tuned.tuning} /> : null}
        {tuned && tuned.capo > 0 ? <small>{`capo ${tuned.capo}`}</small> : null}
      </p>
      <ol>
        {tunes.map(({ id, number, title, asItStands }) => (
          <li key={id}>
            <span className={styles.number}>{number}</span>
            <span>
              {title}
              {asItStands ? <span className={styles.quiet}> as it stands</span> : null}
            </span>
          </li>
        ))}
      </ol>
    </div>
  );
}
