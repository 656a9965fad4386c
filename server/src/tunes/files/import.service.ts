import { createHash, randomUUID } from 'node:crypto';
import { Inject, Injectable, Logger } from '@nestjs/common';
import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type { ImportProgress, ImportQuery, ImportReport } from '@pegwell/shared/contract/tunes';
import { HistoryService } from '../../circles/history.service';
import type { Member } from '../../common/access';
import { announceCircle } from '../../common/announce';
import { cannotBe, notFound } from '../../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../../database/database';
import { contentOf } from '../tune-content';
import { TuneWritesRepository, type WrittenTune } from '../tune-writes.repository';
import { TunesRepository } from '../tunes.repository';
import { ImportProgressRepository } from './import-progress.repository';
import { reportOf } from './import-report';
import { ImportThread } from './import-thread';
import type { ImportPlan } from './plan-import';
import type { ReadFile, Upload } from './read-file';

/** Tunes written between two moves of the progress bar. */
const BATCH = 100;

type Moved = (total: number, written: number) => Promise<void>;

/**
 * A library from a file: read, matched with what is there, and written in one transaction or not at all. It goes on
 * without whoever sent it; sent again under its id, it answers what it answered.
 */
@Injectable()
export class ImportService {
  private readonly logger = new Logger(ImportService.name);

  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly tunes: TunesRepository,
    private readonly writes: TuneWritesRepository,
    private readonly progress: ImportProgressRepository,
    private readonly history: HistoryService,
    private readonly thread: ImportThread,
  ) {}

  /** @throws ProblemException (422, at `file`) when the file is no text, no table, or holds too much */
  async import(
    member: Member,
    upload: Upload,
    { dryRun, progress }: Pick<ImportQuery, 'dryRun' | 'progress'>,
    choices: readonly ImportChoice[] = [],
  ): Promise<ImportReport> {
    const file = await this.thread.read(upload);
    if (!file.ok) throw cannotBe([{ path: 'file', message: file.reason }]);
    if (dryRun) {
      const library = await this.tunes.all(this.db, member.circleId);
      return reportOf(file.value, await this.thread.plan(file.value.tunes, library, choices));
    }
    const id = progress ?? randomUUID();
    const total = file.value.tunes.length;
    if (!(await this.progress.start(this.db, member.circleId, id, digestOf(upload, choices), total))) {
      throw cannotBe([{ path: 'progress', message: 'Another import with this id was begun before.' }]);
    }
    try {
      return await this.write(member, id, file.value, choices);
    } catch (error) {
      await this.watched(() => this.progress.forget(this.db, id));
      throw error;
    }
  }

  async watch(member: Member, progress: string): Promise<ImportProgress> {
    const found = await this.progress.byId(this.db, member.circleId, progress);
    if (!found) throw notFound();
    return found;
  }

  private async write(
    member: Member,
    importId: string,
    file: ReadFile,
    choices: readonly ImportChoice[],
  ): Promise<ImportReport> {
    return this.db.transaction(async (tx) => {
      await this.tunes.holdForImport(tx, member.circleId);
      const done = await this.progress.reportOf(tx, importId);
      if (done) return done;
      const library = await this.tunes.all(tx, member.circleId);
      const plan = await this.thread.plan(file.tunes, library, choices);
      const ids = await this.store(tx, member, { importId, format: file.format }, plan, (total, written) =>
        this.watched(() => this.progress.move(this.db, importId, total, written)),
      );
      const report = reportOf(file, plan, { importId, ids });
      await this.progress.finish(tx, importId, report);
      return report;
    });
  }

  /** @returns the ids of what was made, by its place in the plan */
  private async store(
    tx: Database,
    member: Member,
    { importId, format }: { readonly importId: string; readonly format: ReadFile['format'] },
    plan: ImportPlan,
    moved: Moved,
  ): Promise<ReadonlyMap<number, string>> {
    const ids = new Map<number, string>();
    const created = plan.tunes.flatMap((tune, at): WrittenTune[] => {
      if (tune.action !== 'create') return [];
      const id = randomUUID();
      ids.set(at, id);
      return [{ id, settingId: randomUUID(), ...tune.content }];
    });
    const updated = plan.tunes.flatMap((tune) => (tune.action === 'update' ? [tune] : []));
    const total = created.length + updated.length;
    await moved(total, 0);
    for (let from = 0; from < created.length; from += BATCH) {
      await this.writes.insert(tx, member.circleId, created.slice(from, from + BATCH), from);
      await moved(total, Math.min(from + BATCH, created.length));
    }
    for (let from = 0; from < updated.length; from += BATCH) {
      await this.writes.update(
        tx,
        updated.slice(from, from + BATCH).map(({ after }) => after),
      );
      await moved(total, created.length + Math.min(from + BATCH, updated.length));
    }
    if (total === 0) return ids;
    await this.history.note(tx, member, {
      ...{ what: 'tunes.imported', subjectId: importId },
      before: updated.map(({ before }) => ({ id: before.id, ...contentOf(before) })),
      after: {
        format,
        created: created.map(({ id }) => id),
        updated: updated.map(({ after }) => ({ id: after.id, ...contentOf(after) })),
      },
    });
    if (updated.length > 0) await announceCircle(tx, member.circleId);
    return ids;
  }

  /** A progress bar that cannot move is no reason to lose an import. */
  private async watched(move: () => Promise<void>): Promise<void> {
    try {
      await move();
    } catch (error) {
      this.logger.warn({ err: error }, 'an import could not say how far it is');
    }
  }
}

function digestOf({ format, bytes }: Upload, choices: readonly ImportChoice[]): string {
  const words = JSON.stringify([format, choices]);
  return createHash('sha256').update(words).update(bytes).digest('hex');
}
