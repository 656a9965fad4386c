import { Injectable } from '@nestjs/common';
import { readKindTunings } from '@pegwell/shared/tunes/kind-tunings';
import { ASSUMED_TUNE_MINUTES } from '@pegwell/shared/session/minutes';
import { CirclesService } from '../circles/circles.service';
import { UsualTuningsService, type UsualLookup } from '../circles/usual-tunings.service';
import type { Database } from '../database/database';
import type { PlayableTune } from '../tunes/playable';
import { PlayableService } from '../tunes/playable.service';
import { acceptedTonight } from './accepted';
import { BoardRepository } from './board.repository';
import type { EveningEntry, StoredEvening } from './evening';
import { SessionsRepository, type SessionRow } from './sessions.repository';
import type { StoredEntry } from './sessions.table';

/** Reads a stored session whole, with what every entry plays tonight. */
@Injectable()
export class EveningsService {
  constructor(
    private readonly sessions: SessionsRepository,
    private readonly boards: BoardRepository,
    private readonly tunes: PlayableService,
    private readonly usual: UsualTuningsService,
    private readonly circles: CirclesService,
  ) {}

  async load(db: Database, sessionId: string): Promise<StoredEvening | null> {
    const session = await this.sessions.byId(db, sessionId);
    return session && this.whole(db, session);
  }

  /** For phones: by the code that was typed or scanned, already in its normal form. */
  async loadByCode(db: Database, code: string): Promise<StoredEvening | null> {
    const session = await this.sessions.byCode(db, code);
    return session && this.whole(db, session);
  }

  async whole(db: Database, session: SessionRow): Promise<StoredEvening> {
    const sets = await this.boards.sets(db, session.id);
    const tuneIds = sets.flatMap((set) => set.entries.flatMap(({ tuneId }) => tuneId ?? []));
    const tunes = await this.tunes.byIds(db, session.circleId, [...new Set(tuneIds)]);
    const usual = await this.usual.lookup(db, session.circleId);
    const circle = await this.circles.row(db, session.circleId);
    const shown = sets.map((set) => ({
      id: set.id,
      title: set.title,
      entries: set.entries.map((entry) => describe(entry, tunes, usual)),
    }));
    return {
      session,
      referenceA: circle.referenceA,
      chairs: await this.sessions.chairs(db, session.id),
      sets: shown,
      entries: shown.flatMap((set) => set.entries),
    };
  }
}

function describe(
  entry: StoredEntry,
  tunes: ReadonlyMap<string, PlayableTune>,
  usual: UsualLookup,
): EveningEntry {
  const { id, tuneId, settingId, open, pinned, sitOut } = entry;
  const common = { id, tuneId, settingId, open, pinned, sitOut };
  if (open) {
    const stated = readKindTunings(open.tunings, 'tunings').accepted;
    const words = { title: null, key: open.key, mode: open.mode, rhythm: null, minutes: open.minutes };
    return { ...common, ...words, ...acceptedTonight(stated, words, sitOut, usual), removed: false };
  }
  const tune = tuneId === null ? undefined : tunes.get(tuneId);
  const setting =
    tune?.settings.find((each) => each.id === settingId) ??
    tune?.settings.find((each) => each.usual) ??
    tune?.settings[0];
  // Foreign keys keep a tune with its entries and a setting with its tune.
  if (!tune || !setting) throw new Error(`the entry ${id} has no tune`);
  const words = {
    title: tune.title,
    key: setting.key,
    mode: setting.mode,
    rhythm: tune.rhythm,
    minutes: ASSUMED_TUNE_MINUTES,
  };
  return {
    ...common,
    ...words,
    ...acceptedTonight(setting.stated, words, sitOut, usual),
    removed: tune.removed,
  };
}
