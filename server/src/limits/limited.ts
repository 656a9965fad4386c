import {
  applyDecorators,
  Injectable,
  UseInterceptors,
  type CallHandler,
  type ExecutionContext,
  type NestInterceptor,
  type Type,
} from '@nestjs/common';
import { ApiResponse } from '@nestjs/swagger';
import type { Request } from 'express';
import { catchError, from, mergeMap, type Observable } from 'rxjs';
import { emailKeyOf } from '../common/email-key';
import { ProblemException } from '../common/problem';
import { limitRules, type LimitName, type LimitRule } from './limits';
import { LimitsService } from './limits.service';

/** Longer ones are no addresses, and are refused where the body is judged. */
const LONGEST_ADDRESS = 254;

/** Counts what comes to a route against a rule of `limits.ts`, before the body is judged. */
export const Limited = (name: LimitName) =>
  applyDecorators(
    UseInterceptors(interceptorFor(name)),
    ApiResponse({ status: 429, description: 'Too many tries: `Retry-After` says how many seconds to wait.' }),
  );

function interceptorFor(name: LimitName): Type<NestInterceptor> {
  @Injectable()
  class LimitInterceptor implements NestInterceptor {
    constructor(private readonly limits: LimitsService) {}

    async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
      const request = context.switchToHttp().getRequest<Request>();
      const { ip, account } = request;
      // Whoever is signed in tries their own password, whatever address the body names.
      const address = name === 'password' && account ? undefined : addressIn(request);
      const tried = await this.limits.count(name, { ip, address, accountId: account?.id });
      if (limitRules[name].counts === 'all') return next.handle();
      return next.handle().pipe(
        mergeMap(async (answer: unknown) => {
          await tried.forgive();
          return answer;
        }),
        catchError((error: unknown) =>
          from(isWrong(name, error) ? Promise.resolve() : tried.forgive()).pipe(
            mergeMap(() => {
              throw error;
            }),
          ),
        ),
      );
    }
  }
  return LimitInterceptor;
}

/** By the rule's own list: refused for another reason, a try says nothing about a password or a link. */
function isWrong(name: LimitName, error: unknown): boolean {
  const { wrong = [] }: LimitRule = limitRules[name];
  return error instanceof ProblemException && wrong.includes(error.code);
}

/** The e-mail address in a body that nobody has judged yet: anything may stand there. */
function addressIn(request: Request): string | undefined {
  const body: unknown = request.body;
  if (typeof body !== 'object' || body === null || !('email' in body)) return undefined;
  const { email } = body;
  if (typeof email !== 'string' || email.length > LONGEST_ADDRESS) return undefined;
  return emailKeyOf(email);
}
