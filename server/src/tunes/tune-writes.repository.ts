import { Injectable } from '@nestjs/common';
import { inArray, sql } from 'drizzle-orm';
import { titleKey } from '@pegwell/shared/tunes/title-key';
import type { Database } from '../database/database';
import type { TuneContent } from './tune-content';
import { settings, settingTunings, tunes } from './tunes.table';

export interface WrittenTune extends TuneContent {
  readonly id: string;
  /** The usual setting's. */
  readonly settingId: string;
}

/** Writes tunes, one or many at a time, in as many statements either way. */
@Injectable()
export class TuneWritesRepository {
  /**
   * @param before how many tunes of this transaction were made already: they keep their order by when they
   *   were made, a microsecond apart
   */
  async insert(db: Database, circleId: string, list: readonly WrittenTune[], before = 0): Promise<void> {
    if (list.length === 0) return;
    const rows = list.map(({ id, title, rhythm, parts, composer, source, notes }, index) => {
      const made = sql`now() + ${before + index} * interval '1 microsecond'`;
      return {
        ...{ id, circleId, title, titleKey: titleKey(title), rhythm, parts, composer, source, notes },
        createdAt: made,
        updatedAt: made,
      };
    });
    await db.insert(tunes).values(rows);
    await db
      .insert(settings)
      .values(list.map(({ id, settingId, key, mode }) => ({ id: settingId, tuneId: id, key, mode })));
    await this.insertTunings(db, list);
  }

  /** Everything that a tune says is put in the place of what it said. */
  async update(db: Database, list: readonly WrittenTune[]): Promise<void> {
    if (list.length === 0) return;
    const rows = list.map(({ stated: _, ...words }) => ({ ...words, titleKey: titleKey(words.title) }));
    const given = sql`jsonb_to_recordset(${JSON.stringify(rows)}::jsonb) as given (id uuid, "settingId" uuid,
      title text, "titleKey" text, rhythm text, parts text, composer text, source text, notes text, key text, mode text)`;
    await db.execute(sql`
      update tunes set title = given.title, title_key = given."titleKey", rhythm = given.rhythm, parts = given.parts,
        composer = given.composer, source = given.source, notes = given.notes, updated_at = now()
      from ${given} where tunes.id = given.id`);
    await db.execute(sql`
      update settings set key = given.key, mode = given.mode
      from ${given} where settings.id = given."settingId"`);
    const ids = list.map(({ settingId }) => settingId);
    await db.delete(settingTunings).where(inArray(settingTunings.settingId, ids));
    await this.insertTunings(db, list);
  }

  private async insertTunings(db: Database, list: readonly WrittenTune[]): Promise<void> {
    const rows = list.flatMap(({ settingId, stated }) =>
      Object.entries(stated).flatMap(([kind, accepted]): (typeof settingTunings.$inferInsert)[] =>
        accepted === 'any'
          ? [{ settingId, kind, rank: 0, pitches: null, capo: 0 }]
          : accepted.map(({ pitches, capo }, rank) => ({
              ...{ settingId, kind, rank, capo },
              pitches: [...pitches],
            })),
      ),
    );
    // Five parameters a row, at most 65,535 a statement.
    for (let from = 0; from < rows.length; from += 10_000) {
      await db.insert(settingTunings).values(rows.slice(from, from + 10_000));
    }
  }
}
