import { Injectable } from '@nestjs/common';
import type { Database } from '../database/database';
import { EveningTracesRepository } from './evening-traces.repository';

/** What evenings keep about an account. */
@Injectable()
export class EveningTracesService {
  constructor(private readonly traces: EveningTracesRepository) {}

  /** For its export. */
  async recorded(db: Database, accountId: string) {
    return {
      seats: await this.traces.seats(db, accountId),
      boardsSaved: await this.traces.boardsSaved(db, accountId),
    };
  }
}
