import { Injectable } from '@nestjs/common';
import {
  and,
  asc,
  count,
  desc,
  eq,
  exists,
  inArray,
  isNotNull,
  isNull,
  not,
  or,
  sql,
  type SQL,
} from 'drizzle-orm';
import type { Mode } from '@pegwell/shared/contract/keys';
import type { PageQuery } from '@pegwell/shared/contract/page';
import type { TuneQuery } from '@pegwell/shared/contract/tunes';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { Accepted } from '@pegwell/shared/tunes/kind-tunings';
import type { Database } from '../database/database';
import type { StoredTune } from './tune-content';
import type { TuneFilter, TuningFilter } from './tune-filter';
import { settings, settingTunings, tunes } from './tunes.table';

type TuneSort = TuneQuery['sort'];
type Row = Omit<StoredTune, 'stated'>;

const columns = {
  id: tunes.id,
  settingId: settings.id,
  title: tunes.title,
  key: settings.key,
  mode: settings.mode,
  rhythm: tunes.rhythm,
  parts: tunes.parts,
  composer: tunes.composer,
  source: tunes.source,
  notes: tunes.notes,
  createdAt: tunes.createdAt,
  updatedAt: tunes.updatedAt,
};

const usualSetting = and(eq(settings.tuneId, tunes.id), eq(settings.usual, true), isNull(settings.removedAt));
/** Title keys are plain enough for byte order, which is the same in every database. */
const byTitle = sql`${tunes.titleKey} collate "C"`;

@Injectable()
export class TunesRepository {
  async page(
    db: Database,
    circleId: string,
    filter: TuneFilter,
    sort: TuneSort,
    { page, pageSize }: PageQuery,
  ): Promise<{ tunes: StoredTune[]; total: number }> {
    const where = and(eq(tunes.circleId, circleId), isNull(tunes.removedAt), ...conditions(db, filter));
    const [counted] = await db
      .select({ total: count() })
      .from(tunes)
      .innerJoin(settings, usualSetting)
      .where(where);
    const rows = await db
      .select(columns)
      .from(tunes)
      .innerJoin(settings, usualSetting)
      .where(where)
      .orderBy(...order(sort))
      .limit(pageSize)
      .offset((page - 1) * pageSize);
    return { tunes: await this.withTunings(db, rows.map(typed)), total: counted?.total ?? 0 };
  }

  /**
   * The whole library in the order of its file (by title, tunes of one title as they were made), or all of it
   * that is looked for.
   */
  async all(db: Database, circleId: string, filter: TuneFilter = {}): Promise<StoredTune[]> {
    const rows = await db
      .select(columns)
      .from(tunes)
      .innerJoin(settings, usualSetting)
      .where(and(eq(tunes.circleId, circleId), isNull(tunes.removedAt), ...conditions(db, filter)))
      .orderBy(byTitle, asc(tunes.createdAt), asc(tunes.id));
    return this.withTunings(db, rows.map(typed));
  }

  async byId(
    db: Database,
    circleId: string,
    tuneId: string,
    removed: 'removed' | 'standing' = 'standing',
  ): Promise<StoredTune | null> {
    const mark = removed === 'removed' ? isNotNull(tunes.removedAt) : isNull(tunes.removedAt);
    const rows = await db
      .select(columns)
      .from(tunes)
      .innerJoin(settings, usualSetting)
      .where(and(eq(tunes.circleId, circleId), eq(tunes.id, tuneId), mark));
    const [tune] = await this.withTunings(db, rows.map(typed));
    return tune ?? null;
  }

  /**
   * Holds tunes still until the transaction ends, so that what was read is what gets changed. Boards may go on
   * pointing at them meanwhile.
   */
  async hold(db: Database, circleId: string, tuneId?: string): Promise<void> {
    await db
      .select({ id: tunes.id })
      .from(tunes)
      .where(and(eq(tunes.circleId, circleId), tuneId === undefined ? undefined : eq(tunes.id, tuneId)))
      .orderBy(asc(tunes.id))
      .for('no key update');
  }

  /**
   * Holds the whole library, and lets no other import begin: two at once would both miss what the other makes. (A
   * lock on the circle's row would also stop the rows of progress, which point at it.)
   */
  async holdForImport(db: Database, circleId: string): Promise<void> {
    await db.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`import ${circleId}`}, 0))`);
    await this.hold(db, circleId);
  }

  async setRemoved(db: Database, tuneId: string, removedAt: Date | null): Promise<void> {
    await db.update(tunes).set({ removedAt }).where(eq(tunes.id, tuneId));
  }

  async removeMany(db: Database, tuneIds: readonly string[]): Promise<void> {
    const ids = sql`select value::uuid from jsonb_array_elements_text(${JSON.stringify(tuneIds)}::jsonb)`;
    await db
      .update(tunes)
      .set({ removedAt: sql`now()` })
      .where(sql`${tunes.id} in (${ids})`);
  }

  private async withTunings(db: Database, rows: Row[]): Promise<StoredTune[]> {
    const stated = new Map<string, Record<string, Tuned[] | 'any'>>();
    for (const { settingId } of rows) stated.set(settingId, {});
    // In runs: a statement takes at most 65,535 parameters.
    for (let from = 0; from < rows.length; from += 5_000) {
      const ids = rows.slice(from, from + 5_000).map(({ settingId }) => settingId);
      const tunings = await db
        .select()
        .from(settingTunings)
        .where(inArray(settingTunings.settingId, ids))
        .orderBy(asc(settingTunings.settingId), asc(settingTunings.kind), asc(settingTunings.rank));
      for (const { settingId, kind, pitches, capo } of tunings) {
        const byKind = stated.get(settingId);
        if (!byKind) continue;
        if (pitches === null) byKind[kind] = 'any';
        else {
          const list = (byKind[kind] ??= []);
          if (list !== 'any') list.push({ pitches, capo });
        }
      }
    }
    return rows.map((row) => ({ ...row, stated: (stated.get(row.settingId) ?? {}) satisfies Accepted }));
  }
}

function typed(row: Omit<Row, 'mode'> & { mode: string }): Row {
  return { ...row, mode: row.mode as Mode };
}

function conditions(db: Database, filter: TuneFilter): (SQL | undefined)[] {
  const { search, tonics, mode, rhythm, kind, tuning } = filter;
  return [
    search ? sql`strpos(${tunes.titleKey}, ${search}) > 0` : undefined,
    tonics && inArray(settings.key, [...tonics]),
    mode && eq(settings.mode, mode),
    rhythm ? sql`lower(${tunes.rhythm}) = lower(${rhythm})` : undefined,
    kind === undefined ? undefined : accepts(db, kind, tuning),
  ];
}

/** Tunes that state the tuning for the kind, or are silent where the circle's usual tuning is that one. */
function accepts(db: Database, kind: string, tuning: TuningFilter | 'any' | undefined): SQL | undefined {
  const stated = (...more: (SQL | undefined)[]) =>
    exists(
      db
        .select({ one: sql`1` })
        .from(settingTunings)
        .where(and(eq(settingTunings.settingId, settings.id), eq(settingTunings.kind, kind), ...more)),
    );
  if (tuning === undefined) return stated();
  if (tuning === 'any') return stated(isNull(settingTunings.pitches));
  const named = stated(
    ...tuning.spellings.map((names, index) =>
      inArray(sql`${settingTunings.pitches}[${sql.raw(String(index + 1))}]`, [...names]),
    ),
    tuning.capo === null ? undefined : eq(settingTunings.capo, tuning.capo),
  );
  if (tuning.assumedIn.length === 0) return named;
  const inKey = inArray(sql`${settings.key} || ' ' || ${settings.mode}`, [...tuning.assumedIn]);
  return or(named, and(not(stated()), inKey));
}

/** Ends with the id, so that a tune never stands on two pages or on none. */
function order(sort: TuneSort): SQL[] {
  const down = sort.startsWith('-');
  const turned = (column: SQL) => (down ? sql`${column} desc nulls last` : sql`${column} asc nulls last`);
  const tail = [asc(byTitle), asc(tunes.createdAt), asc(tunes.id)];
  switch (sort) {
    case 'title':
    case '-title':
      return [turned(byTitle), asc(tunes.createdAt), asc(tunes.id)];
    case 'key':
    case '-key':
      return [turned(sql`${settings.key} collate "C"`), asc(settings.mode), ...tail];
    case 'rhythm':
    case '-rhythm':
      return [turned(sql`lower(${tunes.rhythm}) collate "C"`), ...tail];
    case 'updated':
    case '-updated':
      return [down ? desc(tunes.updatedAt) : asc(tunes.updatedAt), ...tail];
  }
}
