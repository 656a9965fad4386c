import type { Follow, FollowMove, FollowTune, Phase } from '@pegwell/shared/contract/live';
import type { Session } from '@pegwell/shared/contract/sessions';
import { cautions, DEFERENCE } from '@pegwell/shared/music/caution';
import { builtInKind, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { moveWords } from '@pegwell/shared/music/words';
import { PegStrip } from '../../../pictures/peg-strip';
import { TuningText } from '../../../pictures/tuning-text';
import { capital, sidesOf, titleOf } from '../follow-words';
import styles from './console-kinds.module.css';

interface ConsoleKindsProps {
  /** One per kind that retunes in the room; empty until they are known. */
  readonly follows: readonly Follow[];
  readonly chairs: Session['chairs'];
  readonly phase: Phase | null;
}

/** What each kind has to turn now, and for the next tune. */
export function ConsoleKinds({ follows, chairs, phase }: ConsoleKindsProps) {
  const shown = follows.filter(({ kind }) => chairs.some((chair) => chair.kind === kind));
  const next = shown[0]?.next;
  if (shown.length === 0) return null;
  const warns = shown.some((follow) =>
    [phase === 'tuning' ? follow.now?.retune : null, follow.next?.retune].some(
      (move) => cautionsOf(follow.kind, move).length > 0,
    ),
  );
  return (
    <section aria-label="Who turns what">
      <ul className={styles.kinds}>
        {shown.map((follow) => {
          const kind = builtInKind(follow.kind);
          const players = chairs.find((chair) => chair.kind === follow.kind)?.count ?? 0;
          if (!kind) return null;
          return (
            <li key={kind.id} className={styles.kind}>
              <h3>{players === 1 ? kind.name : `${players} ${kind.plural.toLowerCase()}`}</h3>
              {follow.now ? (
                <Side
                  label={phase === 'tuning' ? 'turn now' : 'have now'}
                  kind={kind}
                  tune={follow.now}
                  turning={phase === 'tuning'}
                />
              ) : null}
              {follow.next ? (
                <Side label={`next, ${titleOf(follow.next)}`} kind={kind} tune={follow.next} turning />
              ) : null}
            </li>
          );
        })}
      </ul>
      {next === null ? <p className={styles.last}>This is the last tune on the board.</p> : null}
      {warns ? <p className={styles.last}>{DEFERENCE}</p> : null}
    </section>
  );
}

interface SideProps {
  readonly label: string;
  readonly kind: InstrumentKind;
  readonly tune: FollowTune;
  /** Whether its move is still to be made. */
  readonly turning: boolean;
}

function Side({ label, kind, tune, turning }: SideProps) {
  const move = turning ? tune.retune : null;
  const sides = move && sidesOf(move);
  const tuning = tune.tuning && (tune.capo ? `${tune.tuning} capo ${tune.capo}` : tune.tuning);
  return (
    <div className={styles.side}>
      <p className={styles.label}>{label}</p>
      <p className={styles.tuning}>{tuning ? <TuningText text={tuning} /> : 'nothing stated'}</p>
      {sides && move.pegChanges > 0 ? (
        <PegStrip kind={kind} from={sides.from.pitches} to={sides.to.pitches} wordsBeside />
      ) : null}
      <p className={sides ? styles.turn : styles.stay}>
        {sides ? capital(moveWords(kind, sides.from, sides.to)) : 'stay'}
      </p>
      {cautionsOf(kind.id, move).map(({ courseIndex, sentence }) => (
        <p key={courseIndex} className={styles.caution}>
          {sentence}
        </p>
      ))}
    </div>
  );
}

/** Notes are for the player at the peg; from a caution on the host hears of it too. */
function cautionsOf(kindId: string, move: FollowMove | null | undefined) {
  const kind = builtInKind(kindId);
  const sides = move && sidesOf(move);
  if (!kind || !sides) return [];
  return cautions(kind, sides.from.pitches, sides.to.pitches).filter(
    ({ grade }) => grade === 'caution' || grade === 'refused',
  );
}
