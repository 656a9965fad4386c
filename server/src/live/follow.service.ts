import { Inject, Injectable } from '@nestjs/common';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { cannotBe, ProblemException } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { ENV, type Env } from '../env';
import { LimitsService } from '../limits/limits.service';
import { walkOf } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { CODE_LENGTH, CODE_LETTERS, codeEnds, normalCode } from '../sessions/session-code';
import { presentFollow, type Followed } from './follow';
import { FollowMemory, type Remembered } from './follow-memory';
import { followUrl } from './follow-url';
import { LiveRepository } from './live.repository';

const CODE = new RegExp(`^[${CODE_LETTERS}]{${CODE_LENGTH}}$`);
/** Raised when an answer changes its shape, so that no phone keeps the old one for a new one. */
const SHAPE = 1;

/** An answer as it goes out. */
export interface FollowAnswer {
  readonly etag: string;
  /** JSON. */
  readonly body: string;
}

/** Who asks: a network address, and the ETag of the answer they have. */
export interface FollowAsker {
  readonly ip: string | undefined;
  readonly known: string | undefined;
}

interface FollowedEvening extends Remembered, Followed {
  /** By kind, made when first asked for. */
  readonly answers: Map<string, FollowAnswer>;
}

/** What phones with the evening's code see, without an account. */
@Injectable()
export class FollowService {
  /** The listener tells it of changes. */
  readonly memory = new FollowMemory<FollowedEvening>((code) => this.read(code));

  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly evenings: EveningsService,
    private readonly live: LiveRepository,
    private readonly limits: LimitsService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  /** @param typed the code as a person typed it */
  async answer(typed: string, kindId: string, asker: FollowAsker): Promise<FollowAnswer> {
    const kind = builtInKind(kindId);
    if (!kind) {
      throw cannotBe([{ path: 'kind', message: `${kindId} is no instrument that Pegwell knows.` }]);
    }
    const code = normalCode(typed);
    const evening = CODE.test(code) ? await this.find(code, asker) : null;
    if (!evening) {
      throw new ProblemException(
        'not-found',
        'No evening has this code, or it ended more than a day ago. Look at the code again, or ask the host.',
      );
    }
    let answer = evening.answers.get(kind.id);
    if (!answer) {
      const etag = `${tagStart(evening)}${SHAPE}-${evening.version}-${kind.id}"`;
      answer = { etag, body: JSON.stringify(presentFollow(evening, kind)) };
      evening.answers.set(kind.id, answer);
    }
    return answer;
  }

  /**
   * Only codes that open nothing count. A phone that follows already shows the tag of this very evening, and goes
   * on whoever in the same hall tries codes.
   */
  private async find(code: string, { ip, known }: FollowAsker): Promise<FollowedEvening | null> {
    const evening = await this.memory.find(code);
    const follows = evening !== null && known?.includes(tagStart(evening));
    if (!follows) await this.limits.letCodeThrough(ip);
    if (!evening) await this.limits.codeMissed(ip);
    return evening;
  }

  /** Evening, phase and version as they stood at one instant. */
  private async read(code: string): Promise<FollowedEvening | null> {
    return this.db.transaction(
      async (tx) => {
        const stored = await this.evenings.loadByCode(tx, code);
        if (!stored) return null;
        const { id } = stored.session;
        const state = await this.live.state(tx, id);
        return {
          sessionId: id,
          version: await this.live.followVersion(tx, id),
          goodUntil: codeEnds(stored.session, state?.stepAt ?? null),
          stored,
          walk: walkOf(stored),
          phase: state?.phase ?? null,
          followUrl: followUrl(this.env, code),
          answers: new Map(),
        };
      },
      { isolationLevel: 'repeatable read', accessMode: 'read only' },
    );
  }
}

/** How every tag of an evening begins: nobody knows it who has no answer of this evening. */
function tagStart({ sessionId }: Remembered): string {
  return `"${sessionId.slice(0, 8)}-`;
}
