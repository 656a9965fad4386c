import type { Follow, FollowMove, FollowTune } from '@pegwell/shared/contract/live';
import { cautions, DEFERENCE, worstGrade } from '@pegwell/shared/music/caution';
import { builtInKind, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { TURNING_HABITS } from '@pegwell/shared/music/retune-steps';
import { capoWords, turns } from '@pegwell/shared/music/words';
import { momentOf } from '../../../lib/format';
import type { ReactNode } from 'react';
import { PegStrip } from '../../../pictures/peg-strip';
import { announcement } from '../announcement';
import { inOrder, priceOf, retuneLabel, sidesOf, titleOf, turnNow, underTitle } from '../follow-words';
import { named } from './next-section';
import { StringLetters } from './string-letters';
import styles from './room.module.css';

interface RoomViewProps {
  /** One per kind that retunes in the room. */
  readonly follows: readonly Follow[];
  /** How others follow, beside the tune. */
  readonly aside?: ReactNode;
}

/** The whole room on one screen: the tune, and each instrument's tuning and turns. */
export function RoomView({ follows, aside }: RoomViewProps) {
  const [first] = follows;
  if (!first) return null;
  const { now, next, status } = first;
  const turning = follows.some((follow) => movesNow(follow)?.pegChanges);
  return (
    <>
      <section className={styles.now} aria-label="Now">
        <div>
          <p className={styles.small}>
            {now ? (now.phase === 'tuning' ? 'Coming now' : 'Playing now') : first.title}
          </p>
          <h1
            className={styles.title}
            data-long={(now ? titleOf(now) : first.title).length > 22 || undefined}
          >
            {now ? titleOf(now) : status === 'finished' ? 'Good night' : 'Not begun yet'}
          </h1>
          <p className={styles.key}>
            {now
              ? underTitle(now)
              : status === 'finished'
                ? 'This evening is over.'
                : momentOf(first.startsAt, first.timeZone)}
          </p>
        </div>
        {aside}
      </section>
      {(now ?? next) ? (
        <ul className={styles.kinds}>
          {follows.map((follow) => (
            <KindOfRoom key={follow.kind} follow={follow} />
          ))}
        </ul>
      ) : null}
      {turning ? <p className={styles.limits}>{[...TURNING_HABITS, DEFERENCE].join(' ')}</p> : null}
      {now && next ? <Next follows={follows} next={next} /> : null}
    </>
  );
}

/** Before the start it is the retune into the first tune, from what people arrive in. */
const movesNow = ({ now, next }: Follow): FollowMove | null =>
  now?.phase === 'playing' ? null : ((now ?? next)?.retune ?? null);

function KindOfRoom({ follow }: { readonly follow: Follow }) {
  const kind = builtInKind(follow.kind);
  const tune = follow.now ?? follow.next;
  if (!kind || !tune) return null;
  const move = movesNow(follow);
  return (
    <li className={styles.kind}>
      <p className="visually-hidden" role="status">
        {announcement(follow, kind)}
      </p>
      <h2>{kind.name}</h2>
      {tune.pitches ? (
        <StringLetters
          kind={kind}
          pitches={tune.pitches}
          capo={tune.capo ?? 0}
          before={move?.fromPitches ?? null}
        />
      ) : null}
      {move ? (
        <TurnsOfRoom kind={kind} tune={tune} now={follow.now !== null} />
      ) : (
        <p className={styles.set}>{follow.now ? 'Stay as you are' : 'Nothing to turn'}</p>
      )}
    </li>
  );
}

interface TurnsOfRoomProps {
  readonly kind: InstrumentKind;
  readonly tune: FollowTune;
  /** False before the start. */
  readonly now: boolean;
}

/** What a kind turns, large; what the limits refuse is left to each player's own phone. */
function TurnsOfRoom({ kind, tune, now }: TurnsOfRoomProps) {
  const sides = tune.retune && sidesOf(tune.retune);
  if (!sides || !tune.retune) return null;
  const { from, to } = sides;
  const found = cautions(kind, from.pitches, to.pitches);
  const grave = found.filter(({ grade, twoGoes }) => grade !== 'note' || twoGoes);
  const steps = inOrder(
    capoWords(from.capo, to.capo),
    turns(kind, from.pitches, to.pitches).map(({ short }) => short),
    to,
  );
  return (
    <>
      <p className={styles.turn}>
        {now ? turnNow(tune.retune) : `For the first tune: ${retuneLabel(tune.retune)}`}
      </p>
      {worstGrade(found) === 'refused' ? null : (
        <div className={styles.turns}>
          {tune.retune.pegChanges > 0 ? (
            <PegStrip kind={kind} from={from.pitches} to={to.pitches} size="large" wordsBeside />
          ) : null}
          <ol className={styles.steps}>
            {steps.map((step) => (
              <li key={step}>{step}</li>
            ))}
          </ol>
        </div>
      )}
      {grave.map(({ courseIndex, sentence }) => (
        <p key={courseIndex} className={styles.caution}>
          {sentence}
        </p>
      ))}
    </>
  );
}

function Next({ follows, next }: RoomViewProps & { readonly next: FollowTune }) {
  return (
    <section className={styles.next} aria-label="Next">
      <p className={styles.small}>Next</p>
      <h2>{named(next)}</h2>
      <ul>
        {follows.map((follow) => {
          const move = follow.next?.retune ?? null;
          return (
            <li key={follow.kind} className={move ? styles.turn : styles.set}>
              {`${builtInKind(follow.kind)?.name ?? follow.kind}: ${priceOf(move)}`}
            </li>
          );
        })}
      </ul>
    </section>
  );
}
