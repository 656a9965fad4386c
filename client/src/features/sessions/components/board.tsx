import { DndContext, DragOverlay } from '@dnd-kit/core';
import type { Session, ShownEntry, UpdateSession } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { spotAt, standingOf } from '@pegwell/shared/session/board';
import { DEFERENCE } from '@pegwell/shared/music/caution';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { Insertions } from '@pegwell/shared/session/insert';
import { LayoutGroup } from 'framer-motion';
import { useCallback, useMemo, useState } from 'react';
import { newId } from '../../../lib/new-id';
import { useMedia } from '../../../lib/use-media';
import { Button } from '../../../ui/button';
import { useSay } from '../../../ui/status';
import { cardMenu } from '../card-menu';
import { partKinds } from '../../../pictures/changing-kinds';
import { EveningLanes } from '../../../pictures/evening-lanes';
import { entryOfTune, eveningTuneOf, type AssumedFor } from '../entries';
import { focusMenuOf } from '../focus';
import type { BoardInHand } from '../hooks/use-board';
import { useBoardDrag } from '../hooks/use-board-drag';
import { useScored } from '../hooks/use-scored';
import { useUndoKeys } from '../hooks/use-undo-keys';
import { placeWords, spotOfPrice } from '../price-words';
import { ruleWords } from '../rules';
import { setMenu } from '../set-menu';
import { spacedPairs } from '../spaced-pairs';
import { BoardDialogs, type Asking } from './board-dialogs';
import { BoardHead } from './board-head';
import { differenceWords } from './figures';
import { Finder } from './finder';
import { HeldContext } from './held-context';
import { BeforeFirst, Break } from './off-clock';
import { SetColumn } from './set-column';
import { CardFace } from './tune-card';
import cardStyles from './tune-card.module.css';
import styles from './board.module.css';

interface BoardProps {
  readonly held: BoardInHand;
  readonly mayChange: boolean;
  readonly assumedFor: AssumedFor;
  readonly onSuggest: () => void;
  readonly onGoal: (goal: Session['goal']) => void;
  /** Changes what stands beside the board. Rejects with what the server refuses. */
  readonly onUpdate: (changes: UpdateSession) => Promise<unknown>;
}

/** The page on which a host builds an evening; for players the same, to read. */
export function Board({ held, mayChange, assumedFor, onSuggest, onGoal, onUpdate }: BoardProps) {
  const { session, board, perform } = held;
  const say = useSay();
  const [asking, setAsking] = useState<Asking | null>(null);
  const close = () => setAsking(null);
  const scored = useScored(session, board);
  const drag = useBoardDrag(session, held);
  const drafted = useScored(session, drag.draft ?? board);
  const wide = useMedia('(min-width: 861px)');
  const byId = useMemo(() => new Map(scored.places.map((place) => [place.before, place])), [scored.places]);
  const parted = useMemo(() => partKinds(scored.evening, scored.places), [scored]);
  const rules = useMemo(() => ruleWords(board), [board]);
  const spaced = useMemo(() => spacedPairs(scored.evening), [scored.evening]);
  const { chairs } = scored.evening;
  const kinds = useMemo(() => chairs.map(({ kind }) => kind.id), [chairs]);
  const changing = parted.changing.length > 0 ? parted.changing : chairs.slice(0, 1);
  const nowId = session.status === 'live' ? session.nowEntryId : null;
  const firstFree = nowId === null ? 0 : (standingOf(board, nowId)?.position ?? -1) + 1;
  const order = board.sets.map(({ id, entries }) => `${id}:${entries.map((each) => each.id).join()}`).join();

  useUndoKeys(
    () => say(held.takeBack() ? 'Undone.' : 'Nothing to undo.'),
    () => say(held.doAgain() ? 'Done again.' : 'Nothing to do again.'),
    mayChange && asking === null,
  );

  /** Says what was done, and keeps the keyboard at the card. */
  const act = useCallback(
    (label: string, operations: readonly BoardOperation<ShownEntry>[]) => {
      if (!perform(label, operations)) return;
      say(`${label}.`, { label: 'Undo', onPress: () => held.takeBack() });
      const entryId = operations.flatMap((each) => ('entryId' in each ? each.entryId : [])).at(0);
      if (entryId) focusMenuOf(entryId);
    },
    [perform, say, held],
  );

  const { takeBack } = held;
  const add = useCallback(
    (tune: Tune) => {
      const entry = entryOfTune(tune, newId());
      const price = new Insertions(scored.evening, nowId === null ? 0 : 1).cheapest(eveningTuneOf(tune));
      const spot = price && spotOfPrice(board, price, nowId);
      const first = newId();
      const operations: BoardOperation<ShownEntry>[] = spot
        ? [{ type: 'add-entry', entry, to: spot }]
        : [
            { type: 'add-set', setId: first, title: '', after: null },
            { type: 'add-entry', entry, to: spotAt(board, first, 0) },
          ];
      if (!perform(`Added ${tune.title}`, operations)) return;
      const where = price && spot ? placeWords(board, price, nowId) : 'to the first set';
      say(`${tune.title} added ${where}.`, { label: 'Undo', onPress: takeBack });
    },
    [board, nowId, perform, say, scored.evening, takeBack],
  );

  const addSet = () => {
    const setId = newId();
    act('Added a set', [{ type: 'add-set', setId, title: '', after: board.sets.at(-1)?.id ?? null }]);
    focusMenuOf(setId);
  };

  const finder = (draggable: boolean) => (
    <Finder
      session={session}
      evening={scored.evening}
      board={board}
      nowEntryId={nowId}
      kinds={kinds}
      onAdd={add}
      draggable={draggable}
    />
  );

  const heldPlace = drag.held ? drafted.places.find(({ before }) => before === drag.held?.id) : undefined;
  const heldPosition = drag.held ? standingOf(drag.draft ?? board, drag.held.id)?.position : undefined;
  const promise = [
    `${drafted.score.pegChanges} pegs`,
    differenceWords(drafted.score.pegChanges, scored.score.pegChanges) || 'as many as now',
  ].join(', ');

  return (
    <DndContext {...drag.context}>
      <BoardHead
        held={held}
        scored={drafted}
        before={drag.draft ? scored : undefined}
        mayChange={mayChange}
        onSuggest={onSuggest}
        onGoal={onGoal}
        onDetails={() => setAsking({ what: 'details' })}
        onFollow={() => setAsking({ what: 'follow' })}
      />
      <EveningLanes
        board={drag.draft ?? board}
        places={drafted.places}
        chairs={chairs}
        highlight={drag.held?.id ?? nowId}
      />
      <div className={`${styles.columns} ${mayChange && wide ? '' : styles.alone}`}>
        {mayChange && wide ? (
          <aside className={styles.finder} aria-labelledby="finder-title">
            <h2 id="finder-title">Add a tune</h2>
            {finder(true)}
          </aside>
        ) : null}
        <div>
          {nowId === null ? <BeforeFirst place={scored.places[0]} chairs={chairs} /> : null}
          {board.sets.length === 0 ? (
            <div className={styles.begin}>
              <h2>No tune yet</h2>
              <p>
                {mayChange
                  ? 'Find a tune and press Add: it goes where it costs fewest pegs. Or begin with a set of your own.'
                  : 'The hosts have not put a tune on this evening yet.'}
              </p>
            </div>
          ) : null}
          <HeldContext value={{ heldId: drag.held?.id ?? null, target: drag.target }}>
            <LayoutGroup>
              <div className={styles.sets}>
                {board.sets.map((set, setIndex) => {
                  const start = board.sets
                    .slice(0, setIndex)
                    .reduce((sum, { entries }) => sum + entries.length, 0);
                  const next = board.sets.slice(setIndex + 1).find(({ entries }) => entries.length > 0);
                  const breaks = next !== undefined && start + set.entries.length >= firstFree;
                  return (
                    <SetColumn
                      key={set.id}
                      set={set}
                      setIndex={setIndex}
                      start={start}
                      places={byId}
                      chairs={chairs}
                      changing={changing}
                      firstFree={firstFree}
                      nowEntryId={nowId}
                      spaced={spaced}
                      rules={rules}
                      order={order}
                      cardMenu={
                        mayChange
                          ? (entry) =>
                              cardMenu(session, board, entry, firstFree, {
                                perform: act,
                                askPosition: (each) => setAsking({ what: 'position', entry: each }),
                                askBefore: (each) => setAsking({ what: 'before', entry: each }),
                                editOpenPlace: (each) =>
                                  setAsking({ what: 'open', setId: set.id, entry: each }),
                              })
                          : null
                      }
                      menu={
                        mayChange
                          ? setMenu(board, setIndex, firstFree, {
                              perform: act,
                              rename: (setId) => setAsking({ what: 'rename', setId }),
                            })
                          : null
                      }
                      after={
                        set.entries.length > 0 && breaks ? (
                          <Break place={byId.get(next.entries[0]?.id ?? '')} chairs={chairs} />
                        ) : null
                      }
                    >
                      {mayChange ? (
                        <div className={styles.below}>
                          {wide ? null : (
                            <Button look="plain" onClick={() => setAsking({ what: 'finder' })}>
                              Add a tune
                            </Button>
                          )}
                          <Button
                            look="quiet"
                            onClick={() => setAsking({ what: 'open', setId: set.id, entry: null })}
                          >
                            Add an open place
                          </Button>
                        </div>
                      ) : null}
                    </SetColumn>
                  );
                })}
              </div>
            </LayoutGroup>
          </HeldContext>
          {mayChange ? (
            <div className={styles.addSet}>
              {wide || board.sets.length > 0 ? null : (
                <Button onClick={() => setAsking({ what: 'finder' })}>Add a tune</Button>
              )}
              <Button look="outline" onClick={addSet}>
                {board.sets.length === 0 ? 'Begin with an empty set' : 'Add a set'}
              </Button>
            </div>
          ) : null}
        </div>
      </div>
      {scored.score.pegChanges > 0 ? <p className={styles.deference}>{DEFERENCE}</p> : null}
      <DragOverlay dropAnimation={null}>
        {drag.held ? (
          <div className={`${cardStyles.card} ${cardStyles.inHand}`}>
            <CardFace
              entry={drag.held}
              number={(heldPosition ?? 0) + 1}
              place={heldPlace}
              chairs={changing}
            />
            {drag.draft ? <span className={cardStyles.promise}>{promise}</span> : null}
          </div>
        ) : null}
      </DragOverlay>

      <BoardDialogs
        held={held}
        asking={asking}
        onClose={close}
        act={act}
        firstFree={firstFree}
        kinds={kinds}
        assumedFor={assumedFor}
        onUpdate={onUpdate}
        finder={() => finder(false)}
      />
    </DndContext>
  );
}
