import type { RackPlan } from '@pegwell/shared/contract/racks';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { instrumentsWords } from '../rack-words';
import styles from './racks.module.css';

interface RackFiguresProps {
  readonly kind: InstrumentKind;
  readonly plan: RackPlan;
}

/** Pegs and stops of this player, beside what they would be with one instrument. */
export function RackFigures({ kind, plan: { cost, alone } }: RackFiguresProps) {
  const figures = [
    { now: cost.pegChanges, then: alone.pegChanges, one: 'peg', many: 'pegs' },
    { now: cost.stops, then: alone.stops, one: 'stop', many: 'stops' },
  ];
  const lastSaved = figures.findLast(({ now, then }) => now !== then);
  return (
    <dl className={styles.figures}>
      {figures.map((figure) => {
        const { now, then, one, many } = figure;
        return (
          <div key={one}>
            <dt>
              {now === 1 ? one : many}
              {now === then ? null : (
                <>
                  {' instead of '}
                  <b>{then}</b>
                </>
              )}
              {figure === lastSaved ? ` with ${instrumentsWords(kind, 1)}` : null}
            </dt>
            <dd>{now}</dd>
          </div>
        );
      })}
    </dl>
  );
}
