import { Injectable } from '@nestjs/common';
import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Mode } from '@pegwell/shared/contract/keys';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { Database } from '../database/database';
import type { PlayableSetting, PlayableTune } from './playable';
import { settings, settingTunings, tunes } from './tunes.table';

@Injectable()
export class PlayableRepository {
  /** The circle's tunes with these ids, removed ones included (an evening keeps them); unknown ids are left out. */
  async byIds(db: Database, circleId: string, ids: readonly string[]): Promise<Map<string, PlayableTune>> {
    if (ids.length === 0) return new Map();
    const mine = and(eq(tunes.circleId, circleId), inArray(tunes.id, [...ids]));
    const tuneRows = await db.select().from(tunes).where(mine);
    const rows = await db
      .select({ setting: settings, tuning: settingTunings })
      .from(settings)
      .innerJoin(tunes, eq(tunes.id, settings.tuneId))
      .leftJoin(settingTunings, eq(settingTunings.settingId, settings.id))
      .where(mine)
      .orderBy(asc(settings.createdAt), asc(settings.id), asc(settingTunings.kind), asc(settingTunings.rank));
    const found = new Map<string, PlayableTune & { settings: PlayableSetting[] }>();
    for (const { id, title, rhythm, parts, notes, removedAt } of tuneRows) {
      found.set(id, { id, title, rhythm, parts, notes, removed: removedAt !== null, settings: [] });
    }
    const settingsById = new Map<string, { stated: Record<string, Tuned[] | 'any'> }>();
    for (const { setting, tuning } of rows) {
      let entry = settingsById.get(setting.id);
      if (!entry) {
        const fresh = {
          id: setting.id,
          key: setting.key,
          mode: setting.mode as Mode,
          usual: setting.usual && setting.removedAt === null,
          removed: setting.removedAt !== null,
          stated: {} as Record<string, Tuned[] | 'any'>,
        };
        found.get(setting.tuneId)?.settings.push(fresh);
        settingsById.set(setting.id, (entry = fresh));
      }
      if (!tuning) continue;
      if (tuning.pitches === null) entry.stated[tuning.kind] = 'any';
      else {
        const list = (entry.stated[tuning.kind] ??= []);
        if (list !== 'any') list.push({ pitches: tuning.pitches, capo: tuning.capo });
      }
    }
    return found;
  }
}
