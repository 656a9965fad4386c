import { Injectable, type CallHandler, type ExecutionContext, type NestInterceptor } from '@nestjs/common';
import type { Request } from 'express';
import { mergeMap, type Observable } from 'rxjs';
import { FollowListener } from './follow-listener';

const READING = new Set(['GET', 'HEAD']);

/**
 * Whoever changed something and then looks at a phone sees the change: the answer to a change goes out
 * after this process has heard of it.
 */
@Injectable()
export class CaughtUpInterceptor implements NestInterceptor {
  constructor(private readonly listener: FollowListener) {}

  intercept(context: ExecutionContext, next: CallHandler): Observable<unknown> {
    const { method } = context.switchToHttp().getRequest<Request>();
    if (READING.has(method)) return next.handle();
    return next.handle().pipe(
      mergeMap(async (answer: unknown) => {
        await this.listener.catchUp();
        return answer;
      }),
    );
  }
}
