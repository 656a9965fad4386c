import { useQueryClient } from '@tanstack/react-query';
import type { ShownEntry, UpdateSession } from '@pegwell/shared/contract/sessions';
import { setTitle, spotAt } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import type { ReactNode } from 'react';
import { newId } from '../../../lib/new-id';
import { Dialog } from '../../../ui/dialog';
import { moveToPosition } from '../card-menu';
import { entryOfOpenPlace, type AssumedFor } from '../entries';
import { entryTitle } from '../../../music/entry-title';
import type { BoardInHand } from '../hooks/use-board';
import { changeCode, sessionKey } from '../api/session';
import { BeforeDialog } from './before-dialog';
import { DetailsDialog } from './details-dialog';
import { FollowDialog } from './follow-dialog';
import { OpenPlaceDialog } from './open-place-dialog';
import { PositionDialog } from './position-dialog';
import { RenameDialog } from './rename-dialog';

/** What the host is asked about now. */
export type Asking =
  | { readonly what: 'finder' | 'details' | 'follow' }
  | { readonly what: 'position' | 'before'; readonly entry: ShownEntry }
  | { readonly what: 'rename'; readonly setId: string }
  | { readonly what: 'open'; readonly setId: string; readonly entry: ShownEntry | null };

interface BoardDialogsProps {
  readonly held: BoardInHand;
  readonly asking: Asking | null;
  readonly onClose: () => void;
  readonly act: (label: string, operations: readonly BoardOperation<ShownEntry>[]) => void;
  /** The first place of the evening, from 0, that may still change. */
  readonly firstFree: number;
  /** The kinds in the room. */
  readonly kinds: readonly string[];
  readonly assumedFor: AssumedFor;
  readonly onUpdate: (changes: UpdateSession) => Promise<unknown>;
  /** On a phone the finder is a sheet over the board. */
  readonly finder: () => ReactNode;
}

/** Every question that the board asks above itself. */
export function BoardDialogs(props: BoardDialogsProps) {
  const { held, asking, onClose: close, act, firstFree, kinds, assumedFor, onUpdate, finder } = props;
  const { session, board } = held;
  const queries = useQueryClient();
  return (
    <>
      {asking?.what === 'finder' ? (
        <Dialog open onClose={close} title="Add a tune">
          {finder()}
        </Dialog>
      ) : null}
      {asking?.what === 'details' ? (
        <DetailsDialog session={session} onSave={onUpdate} onClose={close} />
      ) : null}
      {asking?.what === 'follow' ? (
        <FollowDialog
          session={session}
          onClose={close}
          onNewCode={async () => {
            queries.setQueryData(sessionKey(session.id), await changeCode(session.id));
          }}
        />
      ) : null}
      {asking?.what === 'position' ? (
        <PositionDialog
          board={board}
          entry={asking.entry}
          first={firstFree + 1}
          onClose={close}
          onMove={(position) => {
            close();
            const operation = moveToPosition(board, asking.entry.id, position);
            if (operation) act(`Moved ${entryTitle(asking.entry)} to ${position + 1}`, [operation]);
          }}
        />
      ) : null}
      {asking?.what === 'before' ? (
        <BeforeDialog
          board={board}
          entry={asking.entry}
          onClose={close}
          onSave={(other) => {
            close();
            act(`${entryTitle(asking.entry)} comes before ${entryTitle(other)}`, [
              { type: 'set-rule', rule: 'before', ids: [asking.entry.id, other.id], holds: true },
            ]);
          }}
        />
      ) : null}
      {asking?.what === 'rename' ? (
        <RenameDialog
          title={titleOfSet(board, asking.setId)}
          onClose={close}
          onRename={(title) => {
            close();
            act(`Renamed to ${title}`, [{ type: 'rename-set', setId: asking.setId, title }]);
          }}
        />
      ) : null}
      {asking?.what === 'open' ? (
        <OpenPlaceDialog
          open={asking.entry?.open ?? null}
          kinds={kinds}
          assumedFor={assumedFor}
          onClose={close}
          onSave={(open) => {
            close();
            const entry = entryOfOpenPlace(open, asking.entry?.id ?? newId(), assumedFor);
            if (asking.entry) {
              act(`Changed ${entryTitle(entry)}`, [{ type: 'set-content', entryId: entry.id, entry }]);
              return;
            }
            const size = board.sets.find(({ id }) => id === asking.setId)?.entries.length ?? 0;
            act(`Added ${entryTitle(entry)}`, [
              { type: 'add-entry', entry, to: spotAt(board, asking.setId, size) },
            ]);
          }}
        />
      ) : null}
    </>
  );
}

function titleOfSet(board: BoardInHand['board'], setId: string): string {
  const index = board.sets.findIndex(({ id }) => id === setId);
  return setTitle(board.sets[index]?.title ?? '', Math.max(0, index));
}
