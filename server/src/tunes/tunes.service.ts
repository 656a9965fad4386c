import { randomUUID } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import type { Page } from '@pegwell/shared/contract/page';
import type {
  CreateTune,
  KindTunings,
  Tune,
  TuneQuery,
  TuneSearch,
  UpdateTune,
} from '@pegwell/shared/contract/tunes';
import { actionsOf } from '@pegwell/shared/policy';
import { readKindTunings, type Accepted } from '@pegwell/shared/tunes/kind-tunings';
import { HistoryService } from '../circles/history.service';
import { UsualTuningsService, type UsualLookup } from '../circles/usual-tunings.service';
import type { Member } from '../common/access';
import { announceCircle } from '../common/announce';
import { cannotBe, notFound } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { contentOf, presentTune, sameContent, type StoredTune } from './tune-content';
import { readFilter } from './tune-filter';
import { TuneWritesRepository } from './tune-writes.repository';
import { TunesRepository } from './tunes.repository';

/** Tunes as they are stored, for a feature that weighs a whole library and shows a page of it. */
export interface FoundTunes {
  readonly tunes: readonly StoredTune[];
  readonly usual: UsualLookup;
  readonly present: (tune: StoredTune) => Tune;
}

/** The circle's library, tune by tune. */
@Injectable()
export class TunesService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly tunes: TunesRepository,
    private readonly writes: TuneWritesRepository,
    private readonly history: HistoryService,
    private readonly usual: UsualTuningsService,
  ) {}

  async list(member: Member, query: TuneQuery): Promise<Page<Tune>> {
    const usual = await this.usual.lookup(this.db, member.circleId);
    const filter = readFilter(query, usual);
    const { page, pageSize, sort } = query;
    const found = await this.tunes.page(this.db, member.circleId, filter, sort, { page, pageSize });
    const can = tuneActions(member);
    const items = found.tunes.map((tune) => presentTune(tune, usual, can));
    return { items, total: found.total, page, pageSize };
  }

  /** All that a search finds, by title. */
  async find(member: Member, search: TuneSearch): Promise<FoundTunes> {
    const usual = await this.usual.lookup(this.db, member.circleId);
    const tunes = await this.tunes.all(this.db, member.circleId, readFilter(search, usual));
    return found(member, tunes, usual);
  }

  /** @throws 404 */
  async findOne(member: Member, tuneId: string): Promise<FoundTunes> {
    const tune = await this.standing(this.db, member, tuneId);
    return found(member, [tune], await this.usual.lookup(this.db, member.circleId));
  }

  async get(member: Member, tuneId: string): Promise<Tune> {
    return this.present(this.db, member, await this.standing(this.db, member, tuneId));
  }

  async create(member: Member, { tunings, ...words }: CreateTune): Promise<Tune> {
    const stated = readTunings(tunings);
    const id = randomUUID();
    return this.db.transaction(async (tx) => {
      await this.writes.insert(tx, member.circleId, [{ id, settingId: randomUUID(), ...words, stated }]);
      const tune = await this.standing(tx, member, id);
      await this.history.note(tx, member, { what: 'tune.created', subjectId: id, after: contentOf(tune) });
      return this.present(tx, member, tune);
    });
  }

  /** What is absent stays. Saying again what is said changes nothing, and no phone hears of it. */
  async change(member: Member, tuneId: string, { tunings, ...words }: UpdateTune): Promise<Tune> {
    const stated = tunings && readTunings(tunings);
    return this.db.transaction(async (tx) => {
      await this.tunes.hold(tx, member.circleId, tuneId);
      const before = await this.standing(tx, member, tuneId);
      const after = { ...before, ...words, stated: stated ?? before.stated };
      if (sameContent(before, after)) return this.present(tx, member, before);
      await this.writes.update(tx, [after]);
      await this.history.note(tx, member, {
        ...{ what: 'tune.changed', subjectId: tuneId },
        ...{ before: contentOf(before), after: contentOf(after) },
      });
      await announceCircle(tx, member.circleId);
      return this.present(tx, member, await this.standing(tx, member, tuneId));
    });
  }

  /** Evenings that have the tune keep it. */
  async remove(member: Member, tuneId: string): Promise<void> {
    await this.db.transaction(async (tx) => {
      await this.tunes.hold(tx, member.circleId, tuneId);
      const before = await this.standing(tx, member, tuneId);
      await this.tunes.setRemoved(tx, tuneId, new Date());
      await this.history.note(tx, member, {
        ...{ what: 'tune.removed', subjectId: tuneId },
        before: contentOf(before),
      });
      await announceCircle(tx, member.circleId);
    });
  }

  /** Undoes a removal; a tune that stands is left as it is. */
  async restore(member: Member, tuneId: string): Promise<Tune> {
    return this.db.transaction(async (tx) => {
      await this.tunes.hold(tx, member.circleId, tuneId);
      if (await this.tunes.byId(tx, member.circleId, tuneId, 'removed')) {
        await this.tunes.setRemoved(tx, tuneId, null);
        await this.history.note(tx, member, { what: 'tune.restored', subjectId: tuneId });
        await announceCircle(tx, member.circleId);
      }
      return this.present(tx, member, await this.standing(tx, member, tuneId));
    });
  }

  private async standing(db: Database, member: Member, tuneId: string): Promise<StoredTune> {
    const tune = await this.tunes.byId(db, member.circleId, tuneId);
    if (!tune) throw notFound();
    return tune;
  }

  private async present(db: Database, member: Member, tune: StoredTune): Promise<Tune> {
    return presentTune(tune, await this.usual.lookup(db, member.circleId), tuneActions(member));
  }
}

function found(member: Member, tunes: readonly StoredTune[], usual: UsualLookup): FoundTunes {
  const can = tuneActions(member);
  return { tunes, usual, present: (tune) => presentTune(tune, usual, can) };
}

function tuneActions(member: Member) {
  return actionsOf(member.role).filter((action) => action.startsWith('tunes.'));
}

function readTunings(tunings: readonly KindTunings[]): Accepted {
  const { accepted, errors } = readKindTunings(tunings, 'tunings');
  if (errors.length > 0) throw cannotBe(errors);
  return accepted;
}
