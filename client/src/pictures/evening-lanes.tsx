import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { showTuned } from '@pegwell/shared/music/tuning';
import type { Board } from '@pegwell/shared/session/board';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import { useMemo } from 'react';
import { listOf } from '../lib/format';
import { entryTitle } from '../music/entry-title';
import { moveOfKind, partKinds } from './changing-kinds';
import { StringLanes } from './string-lanes';
import styles from './evening-lanes.module.css';

interface EveningLanesProps {
  readonly board: Pick<Board<ShownEntry>, 'sets'>;
  readonly places: readonly Place[];
  /** Every kind that is in the room to retune. */
  readonly chairs: readonly Chair[];
  readonly label?: string;
  readonly highlight?: string | null;
  readonly roomBefore?: boolean;
}

/** The lanes of the kinds that retune this evening; those that stand all night are folded into a line of words. */
export function EveningLanes({ board, places, chairs, label, highlight, roomBefore }: EveningLanesProps) {
  const sets = useMemo(
    () =>
      board.sets.map(({ entries }) => ({
        entries: entries.map((entry) => ({ id: entry.id, title: entryTitle(entry) })),
      })),
    [board.sets],
  );
  const { changing, still } = useMemo(() => partKinds({ chairs }, places), [chairs, places]);
  if (places.length === 0) return null;
  const shown = changing.length > 0 ? changing : still.slice(0, 1);
  const folded = changing.length > 0 ? still : still.slice(1);
  return (
    <div className={styles.lanes}>
      <StringLanes
        chairs={shown}
        sets={sets}
        places={places}
        highlight={highlight ?? null}
        {...(label ? { label } : {})}
        {...(roomBefore ? { roomBefore } : {})}
      />
      {folded.length > 0 ? <p className={styles.still}>{stillWords(folded, places)}</p> : null}
    </div>
  );
}

/** `Guitar in EADGBE and bass in EADG all evening.` */
function stillWords(chairs: readonly Chair[], places: readonly Place[]): string {
  const words = chairs.map(({ kind, count }) => {
    const tuned = moveOfKind(places[0], kind.id)?.to;
    const name = (count === 1 ? kind.name : kind.plural).toLowerCase();
    return tuned ? `${name} in ${showTuned(kind, tuned)}` : name;
  });
  const sentence = `${listOf(words)} all evening.`;
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}
