import type { Goal } from '@pegwell/shared/session/evening';
import { tuningMinutes } from '@pegwell/shared/session/minutes';
import { useMemo } from 'react';
import { count, halfMinutes } from '../../../lib/format';
import { StringLanes } from '../../../pictures/string-lanes';
import type { Compared } from '../compare';
import styles from './suggestion.module.css';

interface OrderPictureProps {
  readonly compared: Compared;
  readonly goal: Goal;
  /** "as you have it", "suggested" */
  readonly heading: string;
  readonly proof?: { readonly proved: boolean; readonly words: string };
}

/** One order: its figures in the goal's order, and its lanes. */
export function OrderPicture({ compared, goal, heading, proof }: OrderPictureProps) {
  const { score, places, evening, board } = compared;
  const sets = useMemo(
    () =>
      board.sets.map(({ entries }) => ({
        entries: entries.map((entry) => ({ id: entry.id, title: entry.title ?? `${entry.key} tunes` })),
      })),
    [board.sets],
  );
  const turning = evening.chairs.filter(({ kind }) =>
    places.some((place) => place.kinds.some((move) => move.kind === kind.id && move.pegChanges > 0)),
  );
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
      <div className={styles.lanes}>
        <StringLanes
          chairs={turning.length > 0 ? turning : evening.chairs.slice(0, 1)}
          sets={sets}
          places={places}
          label={`String lanes, ${heading}`}
        />
      </div>
    </section>
  );
}
