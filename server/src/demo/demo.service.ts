import { Inject, Injectable } from '@nestjs/common';
import type { Session } from '@pegwell/shared/contract/sessions';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import { AccountsService } from '../accounts/accounts.service';
import { CirclesService } from '../circles/circles.service';
import { MembersService } from '../circles/members.service';
import type { Account, Member } from '../common/access';
import { DATABASE, type RootDatabase } from '../database/database';
import { RacksService } from '../racks/racks.service';
import { BoardService } from '../sessions/board.service';
import { walkOf, type StoredEvening, type Walk } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { shown } from '../sessions/present';
import { SessionsService } from '../sessions/sessions.service';
import { ImportService } from '../tunes/files/import.service';
import { DemoRepository } from './demo.repository';
import { COMING, DEMO_CHAIRS, DEMO_CIRCLE, demoDates, PAST, TWO_FIDDLES, type DemoEvening } from './evenings';
import { INVENTED, INVENTED_SOURCE } from './invented-tunes';
import { DEMO_HOST, DEMO_PASSWORD, DEMO_PEOPLE } from './people';
import { playedBefore, type DemoPlay } from './played';
import { COMMON, COMMON_SOURCE, FROM_MEMORY, MEMORY_SOURCE } from './traditional-tunes';
import { writeTable } from './tune-row';

/** A circle to look around in, put into an empty database through the services that everybody uses. */
@Injectable()
export class DemoService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly accounts: AccountsService,
    private readonly circles: CirclesService,
    private readonly members: MembersService,
    private readonly imports: ImportService,
    private readonly sessions: SessionsService,
    private readonly board: BoardService,
    private readonly evenings: EveningsService,
    private readonly racks: RacksService,
    private readonly demo: DemoRepository,
  ) {}

  /** @param now from which the dates of the past and the coming evening are reckoned */
  async seed(now = new Date()): Promise<void> {
    const host = await this.seedCircle();
    const tuneIds = await this.seedTunes(host);
    const dates = demoDates(now);
    const past = await this.seedEvening(host, PAST, dates.past, tuneIds);
    await this.playThrough(past.id);
    const coming = await this.seedEvening(host, COMING, dates.coming, tuneIds);
    await this.racks.create(coming.id, TWO_FIDDLES);
  }

  private async seedCircle(): Promise<Member> {
    const people = DEMO_PEOPLE.map(({ name, email, role }) => ({ displayName: name, email, role }));
    const users = await this.accounts.createConfirmed(this.db, people, DEMO_PASSWORD);
    const own = users.find(({ email }) => email === DEMO_HOST.email);
    if (!own) throw new Error('the demo has no host');
    const account: Account = { ...own, signInId: 'none: the demo' };
    const { id: circleId, role } = await this.circles.create(account, DEMO_CIRCLE);
    // Nobody came through the door: this is the one place besides the guard that makes a member.
    const host = { account, circleId, role } as Member;
    for (const person of people) {
      if (person.email !== DEMO_HOST.email) await this.members.add(host, person);
    }
    return host;
  }

  private async seedTunes(host: Member): Promise<ReadonlyMap<string, string>> {
    const bytes = writeTable([
      { source: COMMON_SOURCE, rows: COMMON },
      { source: MEMORY_SOURCE, rows: FROM_MEMORY },
      { source: INVENTED_SOURCE, rows: INVENTED },
    ]);
    const report = await this.imports.import(host, { format: 'csv', bytes }, { dryRun: false });
    const [problem] = report.problems;
    if (problem) throw new Error(`the demo's tunes, line ${problem.line}: ${problem.message}`);
    return new Map(report.tunes.flatMap(({ title, id }) => (id === undefined ? [] : [[title, id] as const])));
  }

  private async seedEvening(
    host: Member,
    evening: DemoEvening,
    startsAt: string,
    tuneIds: ReadonlyMap<string, string>,
  ): Promise<Session> {
    const { title, place, notes } = evening;
    const session = await this.sessions.create(host, {
      ...{ title, place, notes, startsAt },
      chairs: DEMO_CHAIRS.map((chair) => ({ ...chair })),
    });
    return this.board.put(host, session.id, {
      version: session.version,
      sets: evening.sets.map((titles) => ({
        entries: titles.map((each) => ({ tuneId: tuneIds.get(each), pinned: evening.pinned.includes(each) })),
      })),
    });
  }

  /** Writes the record of an evening that is over, all at once. */
  private async playThrough(sessionId: string): Promise<void> {
    const stored = await this.evenings.load(this.db, sessionId);
    if (!stored) throw new Error('the past evening was not stored');
    const walk = walkOf(stored);
    const played = playedBefore(stored, walk);
    const [first, last] = [played[0], played.at(-1)];
    if (!first || !last) throw new Error('nothing was played');
    await this.db.transaction(async (tx) => {
      await this.demo.insertPlays(
        tx,
        played.map((play) => toRow(stored, walk, play)),
      );
      await this.demo.insertLiveState(tx, {
        sessionId,
        liveVersion: played.length + 1,
        phase: null,
        startedAt: first.calledAt,
        stepAt: last.endedAt,
        finishedAt: last.endedAt,
      });
      await this.sessions.setProgress(tx, sessionId, {
        status: 'finished',
        progress: {
          nowEntryId: last.entry.id,
          called: played.map(({ entry }) => entry.id),
          previousEntryId: played.at(-2)?.entry.id ?? null,
          before: tunings(walk, last.entry.id, 'from'),
          inForce: tunings(walk, last.entry.id, 'to'),
        },
        finishedAt: last.endedAt,
      });
    });
  }
}

function tunings(
  walk: Walk,
  entryId: string,
  when: 'from' | 'to',
  kinds = BUILT_IN_KINDS.map(({ id }) => id),
) {
  return Object.fromEntries(kinds.map((kind) => [kind, walk.moves(kind).get(entryId)?.[when] ?? null]));
}

function toRow({ session, chairs }: StoredEvening, walk: Walk, play: DemoPlay) {
  const { id: entryId, tuneId, title, key, mode } = play.entry;
  const { calledAt, playingAt, endedAt } = play;
  const room = chairs.map(({ kind }) => kind);
  return {
    ...{ circleId: session.circleId, sessionId: session.id, entryId, tuneId, title, key, mode },
    ...{ calledAt, playingAt, endedAt },
    tunings: shown(tunings(walk, entryId, 'to', room)),
  };
}
