import { createParamDecorator, SetMetadata, type ExecutionContext } from '@nestjs/common';
import type { Role } from '@pegwell/shared/contract/circles';
import type { CircleAction } from '@pegwell/shared/policy';
import type { Request } from 'express';

/**
 * Who may call a route. Every route declares one; a route without is refused to everybody, and a
 * test that walks all routes fails for it.
 */
export type Access =
  | { readonly who: 'anyone' }
  | { readonly who: 'account' }
  /** Members of the circle in the path whose role may do this. */
  | { readonly who: 'member'; readonly of: 'circle' | 'session'; readonly action: CircleAction };

export const ACCESS = Symbol('access');

export const ForAnyone = () => SetMetadata(ACCESS, { who: 'anyone' } satisfies Access);
export const ForAccounts = () => SetMetadata(ACCESS, { who: 'account' } satisfies Access);
/** The circle is the path's `:circleId`. */
export const ForMembers = (action: CircleAction) =>
  SetMetadata(ACCESS, { who: 'member', of: 'circle', action } satisfies Access);
/** The circle is that of the session in the path's `:id`. */
export const ForSessionMembers = (action: CircleAction) =>
  SetMetadata(ACCESS, { who: 'member', of: 'session', action } satisfies Access);

export interface Account {
  readonly id: string;
  readonly email: string;
  readonly displayName: string;
  /** Whether mail to the address is known to reach them: without it, nothing they cause is mailed to others. */
  readonly confirmed: boolean;
  readonly signInId: string;
}

declare const allowed: unique symbol;
/** A caller whose right was checked. Only the access guard makes one, so that a forgotten check is a type error. */
export interface Member {
  readonly [allowed]: true;
  readonly account: Account;
  readonly circleId: string;
  readonly role: Role;
}

declare module 'express-serve-static-core' {
  interface Request {
    account?: Account;
    member?: Member;
  }
}

export const Caller = createParamDecorator((_: unknown, context: ExecutionContext): Account => {
  const { account } = context.switchToHttp().getRequest<Request>();
  if (!account) throw new Error('@Caller stands on a route that is not for accounts');
  return account;
});

export const AsMember = createParamDecorator((_: unknown, context: ExecutionContext): Member => {
  const { member } = context.switchToHttp().getRequest<Request>();
  if (!member) throw new Error('@AsMember stands on a route that is not for members');
  return member;
});
