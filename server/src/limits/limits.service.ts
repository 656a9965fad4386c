import { createHash } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import type { Pool } from 'pg';
import { RateLimiterMemory, RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { TooManyException } from '../common/too-many';
import { POOL } from '../database/database';
import { CODE_MISSES, limitRules, type Counted, type LimitName, type LimitRule } from './limits';
import { networkOf } from './network';

/** Who tries; what is not known of them is not counted. */
export interface Asker {
  /** As Express tells it: forwarded addresses only from proxies that are believed. */
  readonly ip: string | undefined;
  readonly address?: string | undefined;
  readonly accountId?: string | undefined;
}

/** A try that was counted, to be taken off again when it was right. */
export interface Tried {
  forgive(): Promise<void>;
}

/**
 * Counts tries. In PostgreSQL, so that neither a restart nor a second process gives anybody more of them; what
 * phones ask every two seconds is counted in memory.
 */
@Injectable()
export class LimitsService {
  private readonly limiters: ReadonlyMap<string, RateLimiterPostgres>;
  private readonly misses = new RateLimiterMemory({
    points: CODE_MISSES.tries,
    duration: CODE_MISSES.seconds,
  });

  constructor(@Inject(POOL) pool: Pool) {
    const rules: [string, LimitRule][] = Object.entries(limitRules);
    this.limiters = new Map(
      rules.flatMap(([name, { limits }]) =>
        Object.entries(limits).map(([counted, { tries, seconds }]) => [
          `${name} ${counted}`,
          new RateLimiterPostgres({
            ...{ storeClient: pool, storeType: 'pool', tableName: 'limit_counts', tableCreated: true },
            ...{ keyPrefix: '', points: tries, duration: seconds },
          }),
        ]),
      ),
    );
  }

  /**
   * Counts before it is known whether the try is right: a hundred at once are a hundred.
   * @throws ProblemException 429
   */
  async count(name: LimitName, asker: Asker): Promise<Tried> {
    const tries = this.triesOf(name, asker);
    const counted = await Promise.allSettled(tries.map(({ limiter, key }) => limiter.consume(key)));
    let wait = 0;
    for (const each of counted) {
      if (each.status === 'fulfilled') continue;
      if (!(each.reason instanceof RateLimiterRes)) throw each.reason;
      wait = Math.max(wait, each.reason.msBeforeNext);
    }
    if (wait > 0) throw new TooManyException(limitRules[name].words, wait);
    return {
      forgive: async () => {
        await Promise.all(
          tries.map(({ limiter, key, whole }) => (whole ? limiter.delete(key) : limiter.reward(key))),
        );
      },
    };
  }

  /** @throws ProblemException 429 where too many codes of this network opened nothing */
  async letCodeThrough(ip: string | undefined): Promise<void> {
    const found = await this.misses.get(networkOf(ip ?? ''));
    if (found && found.consumedPoints >= CODE_MISSES.tries) {
      throw new TooManyException(
        'From your network came too many codes that open nothing.',
        found.msBeforeNext,
      );
    }
  }

  async codeMissed(ip: string | undefined): Promise<void> {
    await this.misses.penalty(networkOf(ip ?? ''));
  }

  /** What this try counts against; `whole`: the right password makes up for all the wrong ones before it. */
  private triesOf(name: LimitName, { ip, address, accountId }: Asker) {
    const network = ip === undefined ? undefined : networkOf(ip);
    const whose: Record<Counted, string | undefined> = {
      network,
      address,
      account: accountId,
      here: network !== undefined && address !== undefined ? `${network} ${address}` : undefined,
    };
    return (Object.entries(whose) as [Counted, string | undefined][]).flatMap(([counted, value]) => {
      const limiter = this.limiters.get(`${name} ${counted}`);
      if (!limiter || value === undefined) return [];
      const key = createHash('sha256').update(`${name} ${counted} ${value}`).digest('base64url');
      return [{ limiter, key, whole: counted !== 'network' }];
    });
  }
}
