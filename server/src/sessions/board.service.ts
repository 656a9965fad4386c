import { Inject, Injectable } from '@nestjs/common';
import type { AcceptSuggestion } from '@pegwell/shared/contract/ordering';
import type { PutBoard, Session } from '@pegwell/shared/contract/sessions';
import { announceSession } from '../common/announce';
import type { Member } from '../common/access';
import { cannotBe, notFound, ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { PlayableService } from '../tunes/playable.service';
import { adoptIds } from './board-adopt';
import { mergeBoard, sameBoard, type KnownIds } from './board-merge';
import { BoardRepository } from './board.repository';
import { SessionsRepository, type SessionRow } from './sessions.repository';
import { SessionsService } from './sessions.service';
import type { StoredBoard } from './sessions.table';

/** The board: one version number, every saved version kept, nobody's work overwritten unseen. */
@Injectable()
export class BoardService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly sessions: SessionsRepository,
    private readonly boards: BoardRepository,
    private readonly tunes: PlayableService,
    private readonly present: SessionsService,
  ) {}

  /** Saves the whole board. The same board again is a success, however old the version that came with it. */
  async put(member: Member, sessionId: string, body: PutBoard): Promise<Session> {
    return this.db.transaction(async (tx) => {
      const session = await this.locked(tx, sessionId);
      const stored = await this.storedBoard(tx, session);
      const named = adoptIds(body, stored);
      const { board, errors } = mergeBoard(named, stored, await this.known(tx, session, named));
      if (errors.length === 0 && sameBoard(board, stored)) return this.present.present(tx, member, sessionId);
      // Said before what is wrong with it: the errors may come from the older board.
      if (body.version !== session.version) throw await this.changed(tx, member, sessionId);
      if (errors.length > 0) throw cannotBe(errors);
      return this.save(tx, member, session, stored, board);
    });
  }

  /** Takes an order of the board's own entries; the sizes of the sets may change, nothing else. */
  async reorder(member: Member, sessionId: string, { version, sets }: AcceptSuggestion): Promise<Session> {
    return this.db.transaction(async (tx) => {
      const session = await this.locked(tx, sessionId);
      const stored = await this.storedBoard(tx, session);
      const board = permuted(stored, sets);
      if (board && sameBoard(board, stored)) return this.present.present(tx, member, sessionId);
      if (version !== session.version) throw await this.changed(tx, member, sessionId);
      if (!board) {
        throw cannotBe([{ path: 'sets', message: 'This is not the board’s own entries in another order.' }]);
      }
      return this.save(tx, member, session, stored, board);
    });
  }

  private async save(
    tx: Database,
    member: Member,
    session: SessionRow,
    stored: StoredBoard,
    board: StoredBoard,
  ): Promise<Session> {
    keepsCalledPlaces(session, stored, board);
    const version = session.version + 1;
    await this.boards.write(tx, session.id, board.sets);
    await this.sessions.update(tx, session.id, {
      version,
      medleys: board.medleys.map((ids) => [...ids]),
      befores: board.befores.map(([first, second]) => [first, second]),
      updatedBy: member.account.id,
    });
    await this.boards.keepVersion(tx, session.id, version, member.account.id, board);
    await announceSession(tx, session.id);
    return this.present.present(tx, member, session.id);
  }

  private async changed(tx: Database, member: Member, sessionId: string): Promise<ProblemException> {
    const current = await this.present.present(tx, member, sessionId);
    const who = current.updatedBy ?? 'Somebody';
    return new ProblemException('changed', `${who} changed this evening meanwhile.`, { current });
  }

  private async locked(tx: Database, sessionId: string): Promise<SessionRow> {
    const session = await this.sessions.lock(tx, sessionId);
    if (!session) throw notFound();
    return session;
  }

  private async storedBoard(tx: Database, session: SessionRow): Promise<StoredBoard> {
    const { medleys, befores } = session;
    return { sets: await this.boards.sets(tx, session.id), medleys, befores };
  }

  private async known(tx: Database, session: SessionRow, body: PutBoard): Promise<KnownIds> {
    const entries = body.sets.flatMap((set) => set.entries);
    const found = await this.boards.entriesByIds(
      tx,
      entries.flatMap(({ id }) => id ?? []),
    );
    const tuneIds = [
      ...entries.map(({ tuneId }) => tuneId),
      ...[...found.values()].map(({ tuneId }) => tuneId),
    ];
    const tunes = await this.tunes.byIds(tx, session.circleId, [
      ...new Set(tuneIds.flatMap((id) => id ?? [])),
    ]);
    return {
      sessionId: session.id,
      entries: found,
      sets: await this.boards.setsByIds(
        tx,
        body.sets.flatMap(({ id }) => id ?? []),
      ),
      tunes: new Map(
        [...tunes].map(([id, { settings, removed }]) => [
          id,
          { removed, settingIds: new Set(settings.filter((each) => !each.removed).map((each) => each.id)) },
        ]),
      ),
    };
  }
}

/** Null when `sets` is not a permutation of the board, set by set. */
function permuted(stored: StoredBoard, sets: readonly (readonly string[])[]): StoredBoard | null {
  const entries = new Map(
    stored.sets.flatMap((set) => set.entries.map((entry) => [entry.id, entry] as const)),
  );
  const taken = sets.flat();
  const same = taken.length === entries.size && new Set(taken).size === taken.length;
  // Empty sets keep their place on the board; an order may name them or leave them out.
  const named = sets.length === stored.sets.length ? sets : spread(stored, sets);
  if (!same || !named || taken.some((id) => !entries.has(id))) return null;
  return {
    ...stored,
    sets: stored.sets.map((set, index) => ({
      ...set,
      entries: (named[index] ?? []).flatMap((id) => entries.get(id) ?? []),
    })),
  };
}

function spread(stored: StoredBoard, sets: readonly (readonly string[])[]): (readonly string[])[] | null {
  const rest = [...sets];
  const named = stored.sets.map((set) => (set.entries.length === 0 ? [] : (rest.shift() ?? [])));
  return rest.length === 0 ? named : null;
}

/** A tune that was called is a fact: while the evening is live it stays where it was played. */
function keepsCalledPlaces(session: SessionRow, stored: StoredBoard, board: StoredBoard): void {
  const called = session.status === 'live' ? (session.progress?.called ?? []) : [];
  const before = stored.sets.flatMap((set) => set.entries.map(({ id }) => id));
  const after = board.sets.flatMap((set) => set.entries.map(({ id }) => id));
  const moved = called.filter((id) => before.includes(id) && before.indexOf(id) !== after.indexOf(id));
  if (moved.length === 0) return;
  throw cannotBe(
    moved.map((id) => ({
      path: 'sets',
      message: `Number ${before.indexOf(id) + 1} was called already and stays at its place.`,
    })),
  );
}
