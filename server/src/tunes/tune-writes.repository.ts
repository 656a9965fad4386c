import { Injectable } from '@nestjs/common';
import { sql } from 'drizzle-orm';
import { titleKey } from '@pegwell/shared/tunes/title-key';
import type { Database } from '../database/database';
import type { TuneContent } from './tune-content';
import { settings, settingTunings, tunes } from './tunes.table';

export interface WrittenTune extends TuneContent {
  readonly id: string;
  /** The usual setting's. */
  readonly settingId: string;
}

interface TuningRow {
  readonly settingId: string;
  readonly kind: string;
  readonly rank: number;
  readonly pitches: readonly string[] | null;
  readonly capo: number;
}

/** What `jsonb_to_recordset` makes of a written tune. */
const GIVEN =
  sql.raw(`given (id uuid, "settingId" uuid, position bigint, title text, "titleKey" text, rhythm text,
  parts text, composer text, source text, notes text, key text, mode text)`);

/**
 * Writes tunes, one or many at a time, in as many statements either way. Rows travel as one JSON value: a
 * parameter per cell would cost more time than the writing.
 */
@Injectable()
export class TuneWritesRepository {
  /**
   * @param before how many tunes of this transaction were made already: they keep their order by when they
   *   were made, a microsecond apart
   */
  async insert(db: Database, circleId: string, list: readonly WrittenTune[], before = 0): Promise<void> {
    if (list.length === 0) return;
    const given = sql`jsonb_to_recordset(${rowsOf(list, before)}::jsonb) as ${GIVEN}`;
    await db.execute(sql`
      insert into ${tunes} (id, circle_id, title, title_key, rhythm, parts, composer, source, notes, created_at, updated_at)
      select id, ${circleId}::uuid, title, "titleKey", rhythm, parts, composer, source, notes,
        now() + position * interval '1 microsecond', now() + position * interval '1 microsecond'
      from ${given}`);
    await db.execute(sql`
      insert into ${settings} (id, tune_id, key, mode) select "settingId", id, key, mode from ${given}`);
    await this.insertTunings(db, list);
  }

  /** Everything that a tune says is put in the place of what it said. */
  async update(db: Database, list: readonly WrittenTune[]): Promise<void> {
    if (list.length === 0) return;
    const given = sql`jsonb_to_recordset(${rowsOf(list)}::jsonb) as ${GIVEN}`;
    await db.execute(sql`
      update ${tunes} set title = given.title, title_key = given."titleKey", rhythm = given.rhythm,
        parts = given.parts, composer = given.composer, source = given.source, notes = given.notes,
        updated_at = now()
      from ${given} where tunes.id = given.id`);
    await db.execute(sql`
      update ${settings} set key = given.key, mode = given.mode
      from ${given} where settings.id = given."settingId"`);
    await db.execute(sql`
      delete from ${settingTunings} using ${given} where setting_tunings.setting_id = given."settingId"`);
    await this.insertTunings(db, list);
  }

  private async insertTunings(db: Database, list: readonly WrittenTune[]): Promise<void> {
    const rows = list.flatMap(({ settingId, stated }) =>
      Object.entries(stated).flatMap(([kind, accepted]): TuningRow[] =>
        accepted === 'any'
          ? [{ settingId, kind, rank: 0, pitches: null, capo: 0 }]
          : accepted.map(({ pitches, capo }, rank) => ({ settingId, kind, rank, pitches, capo })),
      ),
    );
    if (rows.length === 0) return;
    await db.execute(sql`
      insert into ${settingTunings} (setting_id, kind, rank, pitches, capo)
      select "settingId", kind, rank, pitches, capo
      from jsonb_to_recordset(${JSON.stringify(rows)}::jsonb)
        as given ("settingId" uuid, kind text, rank integer, pitches text[], capo integer)`);
  }
}

function rowsOf(list: readonly WrittenTune[], before = 0): string {
  return JSON.stringify(
    list.map(({ stated: _, ...words }, index) => ({
      ...words,
      titleKey: titleKey(words.title),
      position: before + index,
    })),
  );
}
