import { randomUUID } from 'node:crypto';
import { Inject, Injectable, Logger } from '@nestjs/common';
import { sql } from 'drizzle-orm';
import {
  IMPORT_MAX_TUNES,
  type ImportProgress,
  type ImportQuery,
  type ImportReport,
  type TuneFileFormat,
} from '@pegwell/shared/contract/tunes';
import { HistoryService } from '../../circles/history.service';
import type { Member } from '../../common/access';
import { announceCircle } from '../../common/announce';
import { cannotBe, notFound } from '../../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../../database/database';
import { contentOf } from '../tune-content';
import { TuneWritesRepository, type WrittenTune } from '../tune-writes.repository';
import { TunesRepository } from '../tunes.repository';
import { decode } from './decode';
import type { TuneFile } from './file-tune';
import { ImportProgressRepository } from './import-progress.repository';
import { planImport, type ImportPlan } from './plan-import';
import { readAbc } from './read-abc';
import { readCsv } from './read-csv';

export interface Upload {
  readonly format: TuneFileFormat;
  readonly bytes: Buffer;
}

/** Tunes written between two moves of the progress bar. */
const BATCH = 100;

/** A library from a file: read, matched with what is there, and written in one transaction or not at all. */
@Injectable()
export class ImportService {
  private readonly logger = new Logger(ImportService.name);

  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly tunes: TunesRepository,
    private readonly writes: TuneWritesRepository,
    private readonly progress: ImportProgressRepository,
    private readonly history: HistoryService,
  ) {}

  /** @throws ProblemException (422, at `file`) when the file is no text, no table, or holds too much */
  async import(member: Member, upload: Upload, { dryRun, progress }: ImportQuery): Promise<ImportReport> {
    const file = readFile(upload);
    if (dryRun) {
      const plan = planImport(file.tunes, await this.tunes.all(this.db, member.circleId));
      return report(upload.format, file, plan);
    }
    if (progress === undefined) return this.write(member, upload.format, file, async () => undefined);
    if (!(await this.progress.start(this.db, member.circleId, progress, file.tunes.length))) {
      throw cannotBe([{ path: 'progress', message: 'An import with this id was begun before.' }]);
    }
    try {
      return await this.write(member, upload.format, file, (total, written) =>
        this.watched(() => this.progress.move(this.db, progress, total, written)),
      );
    } finally {
      await this.watched(() => this.progress.finish(this.db, progress));
    }
  }

  async watch(member: Member, progress: string): Promise<ImportProgress> {
    const found = await this.progress.byId(this.db, member.circleId, progress);
    if (!found) throw notFound();
    return found;
  }

  private async write(
    member: Member,
    format: TuneFileFormat,
    file: TuneFile,
    moved: (total: number, written: number) => Promise<void>,
  ): Promise<ImportReport> {
    return this.db.transaction(async (tx) => {
      // Two imports at once would both miss what the other makes. (A lock on the circle's row would also
      // stop the progress rows, which point at it.)
      await tx.execute(
        sql`select pg_advisory_xact_lock(hashtextextended(${`import ${member.circleId}`}, 0))`,
      );
      await this.tunes.hold(tx, member.circleId);
      const plan = planImport(file.tunes, await this.tunes.all(tx, member.circleId));
      const ids = await this.store(tx, member, format, plan, moved);
      return report(format, file, plan, ids);
    });
  }

  /** @returns the ids of what was made, in the order of the plan's creations */
  private async store(
    tx: Database,
    member: Member,
    format: TuneFileFormat,
    plan: ImportPlan,
    moved: (total: number, written: number) => Promise<void>,
  ): Promise<string[]> {
    const created = plan.tunes.flatMap((tune): WrittenTune[] =>
      tune.action === 'create' ? [{ id: randomUUID(), settingId: randomUUID(), ...tune.content }] : [],
    );
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
    const ids = created.map(({ id }) => id);
    if (total === 0) return ids;
    await this.history.note(tx, member, {
      what: 'tunes.imported',
      before: updated.map(({ before }) => ({ id: before.id, ...contentOf(before) })),
      after: {
        format,
        created: ids,
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

function readFile({ format, bytes }: Upload): TuneFile {
  const refuse = (message: string) => cannotBe([{ path: 'file', message }]);
  const text = decode(bytes);
  if (!text.ok) throw refuse(text.reason);
  const file =
    format === 'abc'
      ? readAbc(text.value.text, IMPORT_MAX_TUNES)
      : readCsv(text.value.text, IMPORT_MAX_TUNES);
  if ('reason' in file) throw refuse(file.reason);
  if (file.tunes.length > IMPORT_MAX_TUNES) {
    throw refuse(`This file holds more than ${IMPORT_MAX_TUNES} tunes. Cut it in parts.`);
  }
  return file;
}

function report(
  format: TuneFileFormat,
  file: TuneFile,
  plan: ImportPlan,
  createdIds: readonly string[] = [],
): ImportReport {
  const count = (action: string) => plan.tunes.filter((tune) => tune.action === action).length;
  const fresh = createdIds[Symbol.iterator]();
  const tunes = plan.tunes.map((tune) => {
    const { line, title, action } = tune;
    if (tune.action === 'skip') return { line, title, action };
    const id = tune.action === 'create' ? fresh.next().value : tune.before.id;
    return { line, title, action, ...(id !== undefined && { id }) };
  });
  const problems = [...file.problems.map((problem) => ({ ...problem, tune: null })), ...plan.problems];
  return {
    format,
    read: plan.tunes.length,
    created: count('create'),
    updated: count('update'),
    unchanged: count('unchanged'),
    skipped: count('skip'),
    problems: problems.sort((one, other) => one.line - other.line),
    tunes,
  };
}
