import { Inject, Injectable } from '@nestjs/common';
import { importUndoneSchema, type ImportUndone, type RecentImports } from '@pegwell/shared/contract/tunes';
import { HistoryService } from '../../circles/history.service';
import type { Member } from '../../common/access';
import { announceCircle } from '../../common/announce';
import { cannotBe, notFound } from '../../common/problem';
import { DATABASE, type RootDatabase } from '../../database/database';
import { sameContent, type StoredTune, type TuneContent } from '../tune-content';
import { TuneWritesRepository } from '../tune-writes.repository';
import { TunesRepository } from '../tunes.repository';
import { ImportProgressRepository } from './import-progress.repository';

/** Milliseconds in which an import can be undone. */
const A_DAY = 24 * 60 * 60 * 1_000;

type Past = TuneContent & { readonly id: string };

/** An import taken back as one step: new tunes go, changed ones are as they were; what was changed since stays. */
@Injectable()
export class ImportUndoService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly tunes: TunesRepository,
    private readonly writes: TuneWritesRepository,
    private readonly history: HistoryService,
    private readonly imports: ImportProgressRepository,
  ) {}

  async recent(member: Member): Promise<RecentImports> {
    return { items: await this.imports.recent(this.db, member.circleId) };
  }

  /** Asked again it answers what it answered. @throws 404; 422 after a day */
  async undo(member: Member, importId: string): Promise<ImportUndone> {
    return this.db.transaction(async (tx) => {
      await this.tunes.holdForImport(tx, member.circleId);
      const undone = await this.history.last(tx, member.circleId, 'tunes.import-undone', importId);
      if (undone) return importUndoneSchema.parse(undone.after);
      const event = await this.history.last(tx, member.circleId, 'tunes.imported', importId);
      if (!event) throw notFound();
      if (Date.now() - event.at.getTime() > A_DAY) {
        throw cannotBe([
          { path: 'importId', message: 'An import can be undone for a day; this one is older.' },
        ]);
      }
      const library = await this.tunes.all(tx, member.circleId);
      const { remove, restore, kept } = whatToUndo(event, library);
      await this.tunes.removeMany(tx, remove);
      await this.writes.update(tx, restore);
      const answer: ImportUndone = {
        removed: remove.length,
        restored: restore.length,
        kept: kept.map(({ id, title }) => ({ id, title })),
      };
      await this.history.note(tx, member, {
        ...{ what: 'tunes.import-undone', subjectId: importId, after: answer },
      });
      await this.imports.markUndone(tx, importId);
      await announceCircle(tx, member.circleId);
      return answer;
    });
  }
}

/** Tunes that were removed since have nothing to undo. */
function whatToUndo(
  event: { readonly before: unknown; readonly after: unknown },
  library: readonly StoredTune[],
) {
  // As ImportService wrote them.
  const before = event.before as readonly Past[];
  const after = event.after as { readonly created: readonly string[]; readonly updated: readonly Past[] };
  const standing = new Map(library.map((tune) => [tune.id, tune]));
  const was = new Map(before.map((tune) => [tune.id, tune]));
  const remove: string[] = [];
  const restore: StoredTune[] = [];
  const kept: StoredTune[] = [];
  for (const id of after.created) {
    const tune = standing.get(id);
    if (!tune) continue;
    if (tune.updatedAt.getTime() === tune.createdAt.getTime()) remove.push(id);
    else kept.push(tune);
  }
  for (const imported of after.updated) {
    const tune = standing.get(imported.id);
    const past = was.get(imported.id);
    if (!tune || !past) continue;
    if (sameContent(tune, imported)) restore.push({ ...tune, ...past });
    else kept.push(tune);
  }
  return { remove, restore, kept };
}
