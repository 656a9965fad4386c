import type { RackTurn } from '@pegwell/shared/contract/racks';
import { cautions, worstGrade } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { capoWords, turns as turnsOf } from '@pegwell/shared/music/words';
import { useState } from 'react';
import { count } from '../../../lib/format';
import { PegStrip } from '../../../pictures/peg-strip';
import { TuningText } from '../../../pictures/tuning-text';
import { Button } from '../../../ui/button';
import type { PlanTune, Turning } from '../plan-sets';
import { tunedText } from '../rack-words';
import { InstrumentBadge } from './instrument-badge';
import styles from './racks.module.css';

interface RackTurnsProps {
  readonly kind: InstrumentKind;
  readonly turning: Turning;
}

/** What is turned at one place, instrument by instrument. */
export function RackTurns({ kind, turning: { before, offClock, turns } }: RackTurnsProps) {
  const where = !offClock
    ? `Stop before ${before.number}, ${before.title}`
    : before.number === 1
      ? 'Before the first tune'
      : 'In the break';
  return (
    <div className={styles.turning} data-off={offClock}>
      <h4>
        {where}
        {offClock ? <span> off the clock</span> : null}
      </h4>
      {turns.map(({ turn, needed }) => (
        <OneTurn key={turn.instrument} {...{ kind, turn, before, needed }} />
      ))}
    </div>
  );
}

interface OneTurnProps {
  readonly kind: InstrumentKind;
  readonly turn: RackTurn;
  readonly before: PlanTune;
  readonly needed: PlanTune;
}

/** What the limits refuse is shown only to a player who says to go on: nobody confirms it for another. */
function OneTurn({ kind, turn, before, needed }: OneTurnProps) {
  const [goesOn, setGoesOn] = useState(false);
  const [from, to] = [turn.from.pitches, turn.to.pitches];
  if (!from || !to) return null;
  const found = cautions(kind, from, to);
  const refused = worstGrade(found) === 'refused' && !goesOn;
  const off = turn.from.capo > 0 ? capoWords(turn.from.capo, 0) : '';
  return (
    <div className={styles.turn}>
      <InstrumentBadge instrument={turn.instrument} state="turn" name={kind.name} />
      {refused ? null : <PegStrip kind={kind} from={from} to={to} wordsBeside />}
      <div className={styles.turnWords}>
        <p className={styles.turnTo}>
          {`${count(turn.pegChanges, 'peg')}, to `}
          <TuningText text={tunedText(turn.to)} />
          {needed.id === before.id ? null : <span>{` for ${needed.number}, ${needed.title}`}</span>}
        </p>
        {refused ? null : (
          <ol>
            {off === '' ? null : <li>Capo off first.</li>}
            {turnsOf(kind, from, to).map(({ full }) => (
              <li key={full}>{full}</li>
            ))}
          </ol>
        )}
        {found.map(({ courseIndex, grade, sentence }) => (
          <p key={courseIndex} className={styles.caution} data-grade={grade}>
            {sentence}
          </p>
        ))}
        {turn.gentler ? (
          <p
            className={styles.caution}
          >{`This tune is also played in ${turn.gentler}, which raises less.`}</p>
        ) : null}
        {refused ? (
          <Button look="danger" onClick={() => setGoesOn(true)}>
            I know my strings. Show the turns
          </Button>
        ) : null}
      </div>
    </div>
  );
}
