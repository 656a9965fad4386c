import { cautions, type Grade } from '@pegwell/shared/music/caution';
import { capoWords, moveWords } from '@pegwell/shared/music/words';
import { showTuned } from '@pegwell/shared/music/tuning';
import type { Chair, KindMove, Place } from '@pegwell/shared/session/evening';
import { stopMinutes } from '@pegwell/shared/session/minutes';
import { count, halfMinutes } from '../../../lib/format';
import { PegStrip } from '../../../pictures/peg-strip';
import { chairWords, moveOfKind, moves } from '../../../pictures/changing-kinds';
import styles from './retune.module.css';

interface RetuneProps {
  readonly place: Place;
  readonly chairs: readonly Chair[];
}

/** What every kind turns at one place: a strip, the words, the price. Nothing where nothing is turned. */
export function Retune({ place, chairs }: RetuneProps) {
  const turning = chairs.flatMap((chair) => {
    const move = moveOfKind(place, chair.kind.id);
    return move && moves(move) ? [{ chair, move }] : [];
  });
  if (turning.length === 0) return null;
  const minutes = place.offClock ? 0 : stopMinutes(place);
  const withPegs = turning.filter(({ move }) => move.pegChanges > 0).length;
  return (
    <div className={styles.place}>
      {turning.map(({ chair, move }) => (
        <KindTurns
          key={chair.kind.id}
          chair={chair}
          move={move}
          named={chairs.length > 1}
          minutes={withPegs === 1 ? minutes : 0}
        />
      ))}
      {withPegs > 1 ? (
        <p className={styles.total}>
          {count(place.pegChanges, 'peg')} in all{minutes > 0 ? ` · about ${halfMinutes(minutes)}` : ''}
        </p>
      ) : null}
    </div>
  );
}

interface KindTurnsProps {
  readonly chair: Chair;
  readonly move: KindMove;
  readonly named: boolean;
  /** Of the stop, 0 where it is said elsewhere or costs none. */
  readonly minutes: number;
}

function KindTurns({ chair, move, named, minutes }: KindTurnsProps) {
  const { kind } = chair;
  const { from, to } = move;
  if (!to) return null;
  if (!from) {
    return (
      <p className={styles.line}>
        {kind.plural}: tuned to {showTuned(kind, to)} from the start
      </p>
    );
  }
  if (move.pegChanges === 0) {
    return (
      <p className={styles.line}>
        {kind.name}: {capoWords(from.capo, to.capo)}
      </p>
    );
  }
  const warnings = cautions(kind, from.pitches, to.pitches).filter(
    ({ grade, twoGoes }) => isGrave(grade) || twoGoes,
  );
  return (
    <div className={styles.turns}>
      <PegStrip kind={kind} from={from.pitches} to={to.pitches} wordsBeside />
      <div className={styles.words}>
        <b>
          {named ? <span className={styles.kind}>{kind.name}: </span> : null}
          {moveWords(kind, from, to)}
        </b>
        <small>
          {count(move.pegChanges, 'peg')} × {chairWords(chair)}
          {minutes > 0 ? ` · about ${halfMinutes(minutes)}` : ''}
        </small>
        {warnings.map(({ courseIndex, grade, sentence }) => (
          <small key={courseIndex} className={isGrave(grade) ? styles.caution : undefined}>
            {sentence}
          </small>
        ))}
      </div>
    </div>
  );
}

/** A real caution; notes and long ways are said quietly. */
const isGrave = (grade: Grade): boolean => grade === 'caution' || grade === 'refused';
