import type { Rack, Racks } from '@pegwell/shared/contract/racks';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { Button } from '../../../ui/button';
import { instrumentsWords, savingWords } from '../rack-words';
import { RackBring } from './rack-bring';
import { RackFigures } from './rack-figures';
import { RackLanes } from './rack-lanes';
import { RackSteps } from './rack-steps';
import styles from './racks.module.css';

interface RackSectionProps {
  readonly rack: Rack;
  readonly sets: Racks['evening']['sets'];
  readonly mayChange: boolean;
  readonly onEdit: () => void;
  readonly onRemove: () => void;
}

/** One player: what the instruments save, how they come, and which is played when. */
export function RackSection({ rack, sets, mayChange, onEdit, onRemove }: RackSectionProps) {
  const kind = builtInKind(rack.kind);
  if (!kind) return null;
  const { plan, instruments } = rack;
  const tunes = sets.some((set) => set.tunes.length > 0);
  return (
    <section className={styles.rack} aria-labelledby={`of-${rack.id}`}>
      <div className={styles.head}>
        <h2 id={`of-${rack.id}`}>
          {rack.player} <span>{instrumentsWords(kind, instruments.length)}</span>
        </h2>
        {plan && tunes ? <RackFigures kind={kind} plan={plan} /> : null}
        {mayChange ? (
          <div className={styles.deeds}>
            <Button look="quiet" onClick={onEdit}>
              Change <span className="visually-hidden">{rack.player}’s instruments</span>
            </Button>
            <Button look="quiet" onClick={onRemove}>
              Take out <span className="visually-hidden">{rack.player}</span>
            </Button>
          </div>
        ) : null}
      </div>
      {plan === null ? (
        <p className={styles.refusal}>{rack.refusal}</p>
      ) : !tunes ? (
        <p className={styles.about}>There is no tune on the board yet. The plan comes with the first.</p>
      ) : (
        <>
          <p className={styles.about}>{savingWords(kind, instruments.length, plan)}</p>
          <RackBring kind={kind} rack={rack} plan={plan} />
          <RackLanes sets={sets} plan={plan} />
          <RackSteps kind={kind} sets={sets} plan={plan} />
        </>
      )}
    </section>
  );
}
