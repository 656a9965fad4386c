import { setImmediate } from 'node:timers/promises';
import { Inject, Injectable } from '@nestjs/common';
import {
  MAX_RACKS,
  type CreateRack,
  type PutRack,
  type Rack,
  type Racks,
} from '@pegwell/shared/contract/racks';
import { readInstruments } from '@pegwell/shared/session/rack';
import { cannotBe, notFound, ProblemException } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { EveningsService } from '../sessions/evenings.service';
import { PlannedEvening } from './planned-evening';
import { RacksRepository, type RackContent, type RackRow } from './racks.repository';

/** The instruments that players bring, and which of them to play and to retune when. */
@Injectable()
export class RacksService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly racks: RacksRepository,
    private readonly evenings: EveningsService,
  ) {}

  async list(sessionId: string): Promise<Racks> {
    const evening = await this.planned(this.db, sessionId);
    const items: Rack[] = [];
    for (const row of await this.racks.ofSession(this.db, sessionId)) {
      items.push(evening.present(row));
      // Under 1 ms for a usual evening; 200 tunes in 14 tunings on four instruments take about 10 ms, some ten
      // times that in a process that has never planned any. Others have their turn between two.
      await setImmediate();
    }
    return { evening: evening.shown(), items };
  }

  async create(sessionId: string, body: CreateRack): Promise<Rack> {
    const content = read(body);
    const evening = await this.planned(this.db, sessionId);
    if ((await this.racks.count(this.db, sessionId)) >= MAX_RACKS) {
      throw cannotBe([{ path: 'player', message: `An evening has room for ${MAX_RACKS} players here.` }]);
    }
    return evening.present(await this.racks.insert(this.db, sessionId, content));
  }

  /** The same again is a success, however old the version that came with it. */
  async put(sessionId: string, rackId: string, { version, ...body }: PutRack): Promise<Rack> {
    return this.db.transaction(async (tx) => {
      const stored = await this.racks.lock(tx, sessionId, rackId);
      if (!stored) throw notFound();
      const evening = await this.planned(tx, sessionId);
      const current = () => evening.present(stored);
      const content = read(body);
      if (sameContent(content, stored)) return current();
      if (version !== stored.version) {
        throw new ProblemException('changed', 'Somebody changed these instruments meanwhile.', {
          current: current(),
        });
      }
      return evening.present(await this.racks.update(tx, stored, content));
    });
  }

  async remove(sessionId: string, rackId: string): Promise<void> {
    if (!(await this.racks.remove(this.db, sessionId, rackId))) throw notFound();
  }

  private async planned(db: Database, sessionId: string): Promise<PlannedEvening> {
    const stored = await this.evenings.load(db, sessionId);
    if (!stored) throw notFound();
    return new PlannedEvening(stored);
  }
}

function read({ player, kind, instruments }: CreateRack): RackContent {
  const { arrivals, errors } = readInstruments(kind, instruments);
  if (errors.length > 0) throw cannotBe(errors);
  return { player, kind, arrivals };
}

function sameContent(a: RackContent, b: RackRow): boolean {
  const arrivals = ({ arrivals: list }: RackContent) =>
    list.map((each) => (typeof each === 'string' ? each : `${each.pitches.join(' ')} ${each.capo}`));
  return a.player === b.player && a.kind === b.kind && arrivals(a).join() === arrivals(b).join();
}
