import type { Goal } from '@pegwell/shared/session/evening';
import { tuningMinutes } from '@pegwell/shared/session/minutes';
import { count, halfMinutes } from '../../../lib/format';
import { EveningLanes } from '../../../pictures/evening-lanes';
import type { Compared } from '../compare';
import styles from './suggestion.module.css';

/** What is known about an order; see proofWords. */
export interface Proof {
  readonly proved: boolean;
  readonly words: string;
}

interface OrderPictureProps {
  readonly compared: Compared;
  readonly goal: Goal;
  /** "as you have it", "suggested" */
  readonly heading: string;
  readonly proof?: Proof;
  /** Whether another order, beside it, turns pegs before its first tune. */
  readonly roomBefore?: boolean;
}

/** One order: its figures in the goal's order, and its lanes. */
export function OrderPicture({ compared, goal, heading, proof, roomBefore = false }: OrderPictureProps) {
  const { score, places, evening, board } = compared;
  const pegs = count(score.pegChanges, 'peg change');
  const stops = count(score.retuneStops, 'stop');
  const [first, second] = goal === 'pegs' ? [pegs, stops] : [stops, pegs];
  const [number = '', ...unit] = first.split(' ');
  const off = score.offClockPegChanges;
  const rest = [
    off > 0 ? `${off} ${goal === 'pegs' ? 'of them ' : 'pegs '}off the clock` : '',
    second,
    `about ${halfMinutes(tuningMinutes(places))} of tuning`,
  ];
  return (
    <section className={styles.order}>
      <div className={styles.head}>
        <h2>
          <b>{number}</b> {unit.join(' ')} {heading}
        </h2>
        <p>{rest.filter(Boolean).join(' · ')}</p>
        {proof ? <p className={proof.proved ? styles.proved : styles.unproved}>{proof.words}</p> : null}
      </div>
      <EveningLanes
        board={board}
        places={places}
        chairs={evening.chairs}
        label={`String lanes, ${heading}`}
        roomBefore={roomBefore}
      />
    </section>
  );
}
