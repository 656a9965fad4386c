import type { Place, Score } from '@pegwell/shared/session/evening';
import { tuningMinutes } from '@pegwell/shared/session/minutes';
import { count, halves } from '../../../lib/format';
import styles from './figures.module.css';

interface FiguresProps {
  readonly score: Score;
  readonly places: readonly Place[];
  /** Of the board as it stands, while a card is held elsewhere. */
  readonly before?: Score | undefined;
}

/** `15 in the break`, `5 before the first tune, 10 in the break` */
export function offClockWords(places: readonly Place[]): string {
  const off = places.filter(({ offClock, pegChanges }) => offClock && pegChanges > 0);
  const first = off.filter((place) => place === places[0]).reduce((sum, each) => sum + each.pegChanges, 0);
  const later = off.reduce((sum, each) => sum + each.pegChanges, 0) - first;
  const parts = [
    first > 0 ? `${first} before the first tune` : '',
    later > 0
      ? `${later} in the break${places.filter(({ offClock }) => offClock).length > 2 ? 's' : ''}`
      : '',
  ];
  return parts.filter(Boolean).join(', ');
}

/** `5 fewer`, `10 more`; nothing where it is the same. */
export function differenceWords(now: number, before: number): string {
  if (now === before) return '';
  return now < before ? `${before - now} fewer` : `${now - before} more`;
}

/** What the evening costs. While a card is held, what it would cost. */
export function Figures({ score, places, before }: FiguresProps) {
  const off = offClockWords(places);
  const pegs = before ? differenceWords(score.pegChanges, before.pegChanges) : '';
  const stops = before ? differenceWords(score.retuneStops, before.retuneStops) : '';
  return (
    <dl className={styles.figures}>
      <div>
        <dt>
          {score.pegChanges === 1 ? 'peg change' : 'peg changes'}
          {pegs ? <em>, {pegs}</em> : off ? `, ${off}` : ''}
        </dt>
        <dd>{score.pegChanges}</dd>
      </div>
      <div>
        <dt>
          {score.retuneStops === 1 ? 'stop' : 'stops'}
          {stops ? <em>, {stops}</em> : ''}
        </dt>
        <dd>{score.retuneStops}</dd>
      </div>
      <div>
        <dt>min tuning, about</dt>
        <dd>{halves(tuningMinutes(places))}</dd>
      </div>
    </dl>
  );
}

/** The levels below pegs and stops, as far as there is something to say. */
export function otherFigures(score: Score): readonly string[] {
  return [
    score.ruleBreaks > 0 ? count(score.ruleBreaks, 'rule broken', 'rules broken') : '',
    score.secondChoices > 0 ? `${count(score.secondChoices, 'player')} not in the first choice` : '',
    score.capoMoves > 0 ? count(score.capoMoves, 'capo move') : '',
    score.keyChanges > 0 ? count(score.keyChanges, 'key change') : '',
  ].filter(Boolean);
}
