import { useDraggable } from '@dnd-kit/core';
import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { entriesOf, type Board } from '@pegwell/shared/session/board';
import type { Insertions } from '@pegwell/shared/session/insert';
import { useMemo } from 'react';
import { keyWords } from '../../../music/key-words';
import { TuningText } from '../../../pictures/tuning-text';
import { eveningTuneOf } from '../entries';
import { priceWords } from '../price-words';
import styles from './finder.module.css';

export interface FinderRowProps {
  readonly tune: Tune;
  /** What one more tune costs on this board. */
  readonly insertions: Insertions;
  readonly board: Board<ShownEntry>;
  readonly nowEntryId: string | null;
  readonly kinds: readonly string[];
  readonly onAdd: (tune: Tune) => void;
  /** Beside the board; in a sheet over it there is nothing to drag to. */
  readonly draggable: boolean;
}

export function FinderRow({ tune, insertions, board, nowEntryId, kinds, onAdd, draggable }: FinderRowProps) {
  const { setNodeRef, listeners, isDragging } = useDraggable({
    id: `tune ${tune.id}`,
    data: { tune },
    disabled: !draggable,
  });
  const { onMouseDown, onTouchStart } = listeners ?? {};
  const price = useMemo(() => insertions.cheapest(eveningTuneOf(tune)), [insertions, tune]);
  const isHere = entriesOf(board).some(({ tuneId }) => tuneId === tune.id);
  const words = price ? priceWords(board, price, nowEntryId) : '';
  const tuning = mainTuning(tune, kinds);
  return (
    <li
      ref={setNodeRef}
      className={`${styles.row} ${draggable ? styles.drag : ''} ${isDragging ? styles.lifted : ''}`}
      {...(onMouseDown && { onMouseDown: onMouseDown as React.MouseEventHandler })}
      {...(onTouchStart && { onTouchStart: onTouchStart as React.TouchEventHandler })}
    >
      <div className={styles.name}>
        <b>{tune.title}</b>
        <small>
          {keyWords(tune.key, tune.mode)}
          {tuning ? (
            <>
              {' · '}
              <TuningText text={tuning} />
            </>
          ) : null}
          {isHere ? ' · on the board' : ''}
        </small>
      </div>
      <span className={price?.pegChanges === 0 ? styles.free : styles.cost}>{words}</span>
      <button
        type="button"
        className={styles.add}
        aria-label={`Add ${tune.title}${words ? `, ${words}` : ''}`}
        onClick={() => onAdd(tune)}
      >
        Add
      </button>
    </li>
  );
}

/** The first kind in the room that has something to tune for it. */
function mainTuning(tune: Tune, kinds: readonly string[]): string | null {
  for (const kindId of kinds) {
    const row = tune.tunings.find(({ kind }) => kind === kindId);
    const first = row?.accepted[0];
    if (first?.pitches) return first.capo > 0 ? `${first.tuning} capo ${first.capo}` : first.tuning;
  }
  return null;
}
