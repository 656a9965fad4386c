import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { setTitle, type BoardSet } from '@pegwell/shared/session/board';
import type { Chair, Place } from '@pegwell/shared/session/evening';
import { tuningMinutes } from '@pegwell/shared/session/minutes';
import { m } from 'framer-motion';
import type { ReactNode } from 'react';
import { count, lengthOf } from '../../../lib/format';
import { ActionMenu, type ActionItem } from '../../../ui/action-menu';
import { Retune } from './retune';
import { DotsIcon } from './icons';
import { Slot } from './slot';
import { TuneCard } from './tune-card';
import styles from './set-column.module.css';

export interface SetColumnProps {
  readonly set: BoardSet<ShownEntry>;
  readonly setIndex: number;
  /** How many entries stand before it in the evening. */
  readonly start: number;
  readonly places: ReadonlyMap<string, Place>;
  /** All kinds in the room, and those that retune. */
  readonly chairs: readonly Chair[];
  readonly changing: readonly Chair[];
  /** Places of the evening, from 0, that keep what they have: played or being played. */
  readonly firstFree: number;
  readonly nowEntryId: string | null;
  /** Pairs of neighbours of a rhythm to keep apart, by the second's id. */
  readonly spaced: ReadonlySet<string>;
  /** By entry id, what the rules between tunes ask of it. */
  readonly rules: ReadonlyMap<string, readonly string[]>;
  /** A value that changes when cards travel. */
  readonly order: string;
  readonly cardMenu: ((entry: ShownEntry) => readonly (readonly ActionItem[])[]) | null;
  readonly menu: readonly (readonly ActionItem[])[] | null;
  /** Below the cards: what can be added. */
  readonly children?: ReactNode;
  /** What comes after it: the break. */
  readonly after?: ReactNode;
}

/** One set: its cards with what is turned between them. */
export function SetColumn(props: SetColumnProps) {
  const { set, setIndex, start, places, chairs, changing, firstFree, nowEntryId, spaced } = props;
  const title = setTitle(set.title, setIndex);
  const inside = set.entries.slice(1).flatMap(({ id }) => places.get(id) ?? []);
  const minutes = set.entries.reduce((sum, entry) => sum + entry.minutes, 0) + tuningMinutes(inside);
  const size = set.entries.length;
  return (
    <section className={styles.set} aria-labelledby={`set-${set.id}`}>
      <div className={styles.head}>
        <h2 id={`set-${set.id}`}>{title}</h2>
        <span className={styles.length}>
          {count(size, 'tune')}
          {size > 0 ? ` · about ${lengthOf(minutes)}` : ''}
        </span>
        {props.menu ? (
          <ActionMenu
            title={title}
            groups={props.menu}
            trigger={
              <button
                type="button"
                className={styles.tool}
                aria-label={`What to do with ${title}`}
                data-menu-of={set.id}
              >
                <DotsIcon />
              </button>
            }
          />
        ) : null}
      </div>
      <ol>
        {set.entries.map((entry, index) => {
          const position = start + index;
          const place = places.get(entry.id);
          const called = entry.id === nowEntryId ? 'now' : position < firstFree ? 'played' : undefined;
          return (
            <m.li key={entry.id} layout="position" layoutId={entry.id} layoutDependency={props.order}>
              <Slot
                setId={set.id}
                index={index}
                around={[set.entries[index - 1]?.id, entry.id]}
                closed={position < firstFree}
                className={index === 0 ? styles.first : undefined}
              >
                {/* The first place of a set is off the clock: shown before the set. */}
                {index > 0 && place ? <Retune place={place} chairs={chairs} /> : null}
                {spaced.has(entry.id) ? (
                  <p className={styles.spaced}>Two of a kind in a row: {entry.rhythm?.toLowerCase()}</p>
                ) : null}
              </Slot>
              <TuneCard
                entry={entry}
                number={position + 1}
                place={place}
                chairs={changing}
                called={called}
                rules={props.rules.get(entry.id)}
                where={`place ${index + 1} of ${size} in ${title}`}
                movable={props.cardMenu !== null && position >= firstFree}
                menu={props.cardMenu?.(entry) ?? null}
              />
            </m.li>
          );
        })}
      </ol>
      <Slot
        setId={set.id}
        index={size}
        around={[set.entries.at(-1)?.id]}
        closed={start + size < firstFree}
        className={size === 0 ? styles.empty : styles.end}
      >
        {size === 0 ? <p>Nothing in this set yet.</p> : null}
      </Slot>
      {props.children}
      {props.after}
    </section>
  );
}
