import { useDraggable } from '@dnd-kit/core';
import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import { ActionMenu, type ActionItem } from '../../../ui/action-menu';
import { keyWords } from '../../../music/key-words';
import { entryTitle } from '../../../music/entry-title';
import { CardTunings } from './card-tunings';
import { DotsIcon, GripIcon, PinIcon } from './icons';
import styles from './tune-card.module.css';

interface CardFaceProps {
  readonly entry: ShownEntry;
  /** Counted from 1 through the evening. */
  readonly number: number;
  readonly place: Place | undefined;
  readonly chairs: readonly Chair[];
  /** While live: it was played, or is played now. */
  readonly called?: 'played' | 'now' | undefined;
  /** What the rules between tunes ask of it: `before Grey Owl`. */
  readonly rules?: readonly string[] | undefined;
}

/** What a card says, on the board and in the hand. */
export function CardFace({ entry, number, place, chairs, called, rules = [] }: CardFaceProps) {
  const { open, rhythm, pinned, removed, minutes } = entry;
  const about = [
    open ? `open place, ${minutes} min, whoever calls` : keyWords(entry.key, entry.mode),
    open ? null : rhythm,
    ...rules,
  ];
  return (
    <>
      <span className={styles.number}>
        {number}
        {pinned ? (
          <span className={styles.pin} title="Pinned: keeps its place when an order is suggested">
            <PinIcon />
            <span className="visually-hidden">pinned</span>
          </span>
        ) : null}
      </span>
      <div className={styles.name}>
        <b>{entryTitle(entry)}</b>
        <small>
          {about.filter(Boolean).join(' · ')}
          {called ? <strong> · {called}</strong> : null}
          {removed ? <em> · no longer in the library</em> : null}
        </small>
      </div>
      <CardTunings entry={entry} place={place} chairs={chairs} />
    </>
  );
}

interface TuneCardProps extends CardFaceProps {
  /** Where it stands, for a screen reader: "place 3 of 9 in First set". */
  readonly where: string;
  /** Null where nothing can be done with it. */
  readonly menu: readonly (readonly ActionItem[])[] | null;
  readonly movable: boolean;
}

/** One entry of the board. Dragged by its grip with a finger or the keyboard, anywhere with a mouse. */
export function TuneCard({ where, menu, movable, ...face }: TuneCardProps) {
  const { entry } = face;
  const title = entryTitle(entry);
  const { attributes, listeners, setNodeRef, setActivatorNodeRef, isDragging } = useDraggable({
    id: entry.id,
    data: { entryId: entry.id },
    disabled: !movable,
  });
  const look = [
    styles.card,
    face.entry.open && styles.open,
    face.called && styles.called,
    face.called === 'now' && styles.now,
    isDragging && styles.lifted,
    !menu && styles.plain,
  ];
  const { onMouseDown, ...byGrip } = listeners ?? {};
  return (
    <article
      ref={setNodeRef}
      className={look.filter(Boolean).join(' ')}
      aria-label={`${title}, ${where}`}
      {...(onMouseDown && { onMouseDown: onMouseDown as React.MouseEventHandler })}
    >
      <CardFace {...face} />
      {menu ? (
        <div className={styles.tools}>
          <ActionMenu
            title={title}
            groups={menu}
            trigger={
              <button
                type="button"
                className={styles.tool}
                aria-label={`What to do with ${title}`}
                data-menu-of={entry.id}
                onMouseDown={(event) => event.stopPropagation()}
              >
                <DotsIcon />
              </button>
            }
          />
          {movable ? (
            <button
              type="button"
              ref={setActivatorNodeRef}
              className={`${styles.tool} ${styles.grip}`}
              {...attributes}
              {...byGrip}
              aria-label={`Move ${title}, ${where}`}
            >
              <GripIcon />
            </button>
          ) : null}
        </div>
      ) : null}
    </article>
  );
}
