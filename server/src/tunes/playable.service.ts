import { Injectable } from '@nestjs/common';
import type { Database } from '../database/database';
import type { PlayableTune } from './playable';
import { PlayableRepository } from './playable.repository';

/** What evenings, phones and sheets need to know of tunes. */
@Injectable()
export class PlayableService {
  constructor(private readonly playable: PlayableRepository) {}

  byIds(db: Database, circleId: string, ids: readonly string[]): Promise<Map<string, PlayableTune>> {
    return this.playable.byIds(db, circleId, ids);
  }
}
