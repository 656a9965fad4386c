import {
  applyDecorators,
  UseInterceptors,
  type CallHandler,
  type ExecutionContext,
  type NestInterceptor,
} from '@nestjs/common';
import { ApiResponse } from '@nestjs/swagger';
import type { Request } from 'express';
import { finalize, type Observable } from 'rxjs';
import { TooManyException } from '../common/too-many';
import { atOnce, type AtOnceName } from './limits';
import { networkOf } from './network';

/** Whoever waits for an answer has it within seconds; asking again sooner only meets the same refusal. */
const WAIT_MS = 2_000;

/** How much of one kind of work is under way, by whom. */
class UnderWay {
  private readonly counts = new Map<string, number>();

  of(who: string): number {
    return this.counts.get(who) ?? 0;
  }

  move(who: string, by: 1 | -1): void {
    const count = this.of(who) + by;
    if (count === 0) this.counts.delete(who);
    else this.counts.set(who, count);
  }
}

const underWay: Readonly<Record<AtOnceName, UnderWay>> = { suggest: new UnderWay(), import: new UnderWay() };

class AtOnceInterceptor implements NestInterceptor {
  constructor(private readonly name: AtOnceName) {}

  intercept(context: ExecutionContext, next: CallHandler): Observable<unknown> {
    const { account, ip } = context.switchToHttp().getRequest<Request>();
    const { account: perAccount, network: perNetwork, words } = atOnce[this.name];
    const counts = underWay[this.name];
    const whose = [
      { who: `account ${account?.id ?? ''}`, most: perAccount },
      { who: `network ${networkOf(ip ?? '')}`, most: perNetwork },
    ];
    if (whose.some(({ who, most }) => counts.of(who) >= most)) throw new TooManyException(words, WAIT_MS);
    for (const { who } of whose) counts.move(who, 1);
    return next.handle().pipe(
      finalize(() => {
        for (const { who } of whose) counts.move(who, -1);
      }),
    );
  }
}

/** Refuses whoever has as much of this work under way as `limits.ts` allows. */
export const AtOnce = (name: AtOnceName) =>
  applyDecorators(
    UseInterceptors(new AtOnceInterceptor(name)),
    ApiResponse({
      status: 429,
      description: 'Too much at once: `Retry-After` says how many seconds to wait.',
    }),
  );
