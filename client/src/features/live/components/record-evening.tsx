import type { CirclePlay } from '@pegwell/shared/contract/live';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { count, dayOf, lengthOf, timeOf } from '../../../lib/format';
import { keyWords } from '../../../music/key-words';
import { TuningText } from '../../../pictures/tuning-text';
import { playedFor, shortLength, stopOf, stopsOf, type PlayedEvening } from '../record';
import styles from './record.module.css';

/** One evening: what was played, when, in which tunings, and how long the room took to tune. */
export function RecordEvening({ evening }: { readonly evening: PlayedEvening }) {
  const { title, startsAt, timeZone, plays } = evening;
  return (
    <section className={styles.evening}>
      <h2>{title}</h2>
      <p className={styles.about}>{`${dayOf(startsAt, timeZone)} · ${summary(plays)}`}</p>
      <ol>
        {plays.map((play) => (
          <Row key={play.id} play={play} timeZone={timeZone} />
        ))}
      </ol>
    </section>
  );
}

function Row({ play, timeZone }: { readonly play: CirclePlay; readonly timeZone: string }) {
  const stop = stopOf(play);
  const played = playedFor(play);
  // The host went on from tuning: when the room was in tune is not known.
  const untimed = play.playingAt === null && play.endedAt !== null;
  const key = keyWords(play.key, play.mode);
  return (
    <li className={styles.row}>
      <time dateTime={play.calledAt}>{timeOf(play.calledAt, timeZone)}</time>
      <span className={styles.title}>
        {play.title ?? `${key} tunes`}{' '}
        <span className={styles.key}>{play.title === null ? 'open place' : key}</span>
      </span>
      <span className={styles.tunings}>
        {Object.entries(play.tunings).map(([kind, tuning]) =>
          tuning === null ? null : (
            <span key={kind}>
              {builtInKind(kind)?.name ?? kind} <TuningText text={tuning} />
            </span>
          ),
        )}
      </span>
      <span className={stop === null ? styles.quiet : styles.stop}>
        {stop === null ? (untimed ? 'tuning not timed' : '') : `tuned ${shortLength(stop)}`}
      </span>
      <span className={styles.played}>
        {play.endedAt === null ? 'now' : played === null ? '' : shortLength(played)}
      </span>
    </li>
  );
}

/** `14 tunes, 2 h 05; 5 stops to tune, 2½ min each` */
function summary(plays: readonly CirclePlay[]): string {
  const [first, last] = [plays[0], plays.at(-1)];
  const end = last?.endedAt;
  const minutes = first && end ? (Date.parse(end) - Date.parse(first.calledAt)) / 60_000 : 0;
  const stops = stopsOf(plays);
  const tuning =
    stops.count === 0
      ? 'no stop to tune'
      : `${count(stops.count, 'stop')} to tune${stops.average === null ? '' : `, ${shortLength(stops.average)} on average`}`;
  return `${count(plays.length, 'tune')}${minutes >= 1 ? `, ${lengthOf(minutes)}` : ''}; ${tuning}`;
}
