import { Injectable } from '@nestjs/common';
import type { Database } from '../database/database';
import { CirclesRepository } from './circles.repository';
import { DepartureRepository } from './departure.repository';

/** What somebody leaves behind in circles, and what is told to them about it. */
@Injectable()
export class DepartureService {
  constructor(
    private readonly circles: CirclesRepository,
    private readonly departures: DepartureRepository,
  ) {}

  /**
   * Gets all of an account's circles ready for its deletion, in whose transaction it is called. A circle that
   * nobody else is in goes with it.
   * @returns the names of circles with others in them that would be left without a host: then nothing may be deleted
   */
  async leaveAll(tx: Database, accountId: string): Promise<string[]> {
    const hostless: string[] = [];
    // In one order for everybody, so that two who delete at once do not wait for each other.
    const own = await this.circles.ofAccount(tx, accountId);
    for (const { id, name } of own.sort((a, b) => (a.id < b.id ? -1 : 1))) {
      const hosts = await this.circles.holdHosts(tx, id);
      if (hosts.some((host) => host.accountId !== accountId)) continue;
      if (!(await this.departures.hasOthers(tx, id, accountId))) await this.departures.removeCircle(tx, id);
      else if (hosts.length > 0) hostless.push(name);
    }
    return hostless.sort((a, b) => a.localeCompare(b, 'en'));
  }

  /** What circles keep about an account, for its export. */
  async recorded(db: Database, accountId: string) {
    return {
      circles: await this.departures.memberships(db, accountId),
      done: await this.departures.deeds(db, accountId),
    };
  }
}
