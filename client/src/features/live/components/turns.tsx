import type { FollowMove } from '@pegwell/shared/contract/live';
import { cautions, DEFERENCE, worstGrade, type StringCaution } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { retuneSteps, TURNING_HABITS } from '@pegwell/shared/music/retune-steps';
import { capoWords, turns } from '@pegwell/shared/music/words';
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import { retuneAddress } from '../../../music/retune-address';
import { PegStrip } from '../../../pictures/peg-strip';
import { Button, LinkButton } from '../../../ui/button';
import { inOrder, sidesOf } from '../follow-words';
import styles from './turns.module.css';

interface TurnsProps {
  readonly kind: InstrumentKind;
  readonly move: FollowMove;
  /** `now`: step by step with how to do it safely; `soon`: what will be turned. */
  readonly when: 'now' | 'soon';
  /** A4 of the room, in hertz: leads to the card that goes through the turns one by one. */
  readonly referenceA?: number;
}

/**
 * A retune peg by peg, with what to look out for. What the limits refuse is shown only to a player who
 * says to go on: nobody confirms it for another.
 */
export function Turns({ kind, move, when, referenceA }: TurnsProps) {
  const { code } = useParams();
  const [goesOn, setGoesOn] = useState(false);
  const sides = sidesOf(move);
  if (!sides) return null;
  const { from, to } = sides;
  const found = cautions(kind, from.pitches, to.pitches);
  const refused = worstGrade(found) === 'refused' && !goesOn;
  const soon = inOrder(
    capoWords(from.capo, to.capo),
    turns(kind, from.pitches, to.pitches).map(({ full }) => full),
    to,
  );
  const pegsTurn = move.pegChanges > 0;
  return (
    <div className={styles.turns}>
      {refused || !pegsTurn ? null : (
        <PegStrip kind={kind} from={from.pitches} to={to.pitches} size="large" wordsBeside />
      )}
      {refused ? null : (
        <ol className={styles.steps} data-when={when}>
          {(when === 'now' ? retuneSteps(kind, from, to) : soon).map((step) => (
            <li key={step}>{step}</li>
          ))}
        </ol>
      )}
      <Cautions found={found} gentler={move.gentler} />
      {pegsTurn && referenceA !== undefined ? (
        <LinkButton look="outline" to={retuneAddress(kind, from, to, { code, referenceA })}>
          Peg by peg, with the sound
        </LinkButton>
      ) : null}
      {refused ? (
        <Button look="danger" onClick={() => setGoesOn(true)}>
          I know my strings. Show the turns
        </Button>
      ) : null}
      {pegsTurn && (when === 'now' || found.length > 0) ? (
        <div className={styles.habits}>
          {when === 'now' ? TURNING_HABITS.map((habit) => <p key={habit}>{habit}</p>) : null}
          <p>{DEFERENCE}</p>
        </div>
      ) : null}
    </div>
  );
}

interface CautionsProps {
  readonly found: readonly StringCaution[];
  readonly gentler: string | null;
}

/** What to look out for, string by string. */
export function Cautions({ found, gentler }: CautionsProps) {
  if (found.length === 0) return null;
  return (
    <ul className={styles.cautions}>
      {found.map(({ courseIndex, grade, sentence }) => (
        <li key={courseIndex} data-grade={grade}>
          {sentence}
        </li>
      ))}
      {gentler ? <li>{`This tune is also played in ${gentler}, which raises less.`}</li> : null}
    </ul>
  );
}
