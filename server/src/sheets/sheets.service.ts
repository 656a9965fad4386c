import { Inject, Injectable } from '@nestjs/common';
import type { Paper } from '@pegwell/shared/contract/sheets';
import { notFound } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { ENV, type Env } from '../env';
import type { StoredEvening } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { PlayableService } from '../tunes/playable.service';
import { buildSheet } from './build-sheet';
import { eveningCalendar } from './calendar/evening-calendar';
import { Press } from './press/press';

/** A file with the title it goes by. */
export interface NamedFile {
  readonly title: string;
  readonly bytes: Buffer;
}

/** What of an evening goes on paper and into calendars. */
@Injectable()
export class SheetsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    @Inject(ENV) private readonly env: Env,
    private readonly evenings: EveningsService,
    private readonly tunes: PlayableService,
    private readonly press: Press,
  ) {}

  async sheet(sessionId: string, paper: Paper): Promise<NamedFile> {
    const stored = await this.load(sessionId);
    const tuneIds = [...new Set(stored.entries.flatMap(({ tuneId }) => tuneId ?? []))];
    const tunes = await this.tunes.byIds(this.db, stored.session.circleId, tuneIds);
    const notes = new Map([...tunes].map(([id, tune]) => [id, tune.notes]));
    const sheet = buildSheet(stored, notes, this.env.PEGWELL_URL);
    return { title: stored.session.title, bytes: await this.press.draw(sheet, paper) };
  }

  async calendar(sessionId: string): Promise<NamedFile> {
    const stored = await this.load(sessionId);
    const calendar = eveningCalendar(stored, this.env.PEGWELL_URL, new Date());
    return { title: stored.session.title, bytes: Buffer.from(calendar) };
  }

  private async load(sessionId: string): Promise<StoredEvening> {
    const stored = await this.evenings.load(this.db, sessionId);
    if (!stored) throw notFound();
    return stored;
  }
}
