import { Inject, Injectable, type CanActivate, type ExecutionContext } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { idSchema } from '@pegwell/shared/contract/page';
import { may } from '@pegwell/shared/policy';
import type { Request, Response } from 'express';
import { SignInsService } from '../accounts/sign-ins.service';
import { CirclesService } from '../circles/circles.service';
import { ACCESS, type Access, type Account, type Member } from '../common/access';
import { notFound, ProblemException } from '../common/problem';
import { SessionsService } from '../sessions/sessions.service';

/** The one door: authentication is on by default, a right is one row of the policy table. */
@Injectable()
export class AccessGuard implements CanActivate {
  constructor(
    @Inject(Reflector) private readonly reflector: Reflector,
    private readonly signIns: SignInsService,
    private readonly circles: CirclesService,
    private readonly sessions: SessionsService,
  ) {}

  async canActivate(context: ExecutionContext): Promise<boolean> {
    const request = context.switchToHttp().getRequest<Request>();
    const response = context.switchToHttp().getResponse<Response>();
    const access = this.reflector.get<Access | undefined>(ACCESS, context.getHandler());
    if (access?.who !== 'anyone') {
      // Said before anything is looked up, and before the body is judged.
      const account = await this.signIns.accountOf(request, response);
      if (!account) throw new ProblemException('not-signed-in');
      if (!access)
        throw new ProblemException('not-allowed', 'This route says of nobody that they may call it.');
      request.account = account;
      if (access.who === 'member') request.member = await this.memberOf(account, access, request);
    }
    if (request.bodyProblem) throw request.bodyProblem;
    return true;
  }

  private async memberOf(
    account: Account,
    access: Access & { who: 'member' },
    request: Request,
  ): Promise<Member> {
    const circleId = await this.circleOf(access, request);
    const role = circleId ? await this.circles.roleOf(circleId, account.id) : null;
    // Not there, and not yours to see, are the same words.
    if (!circleId || !role) throw notFound();
    if (!may(role, access.action)) {
      throw new ProblemException(
        'not-allowed',
        `As a ${role} of this circle you cannot do this. Ask a host.`,
      );
    }
    return { account, circleId, role } as Member;
  }

  private async circleOf(access: Access & { who: 'member' }, request: Request): Promise<string | null> {
    const id = idSchema.safeParse(access.of === 'circle' ? request.params['circleId'] : request.params['id']);
    if (!id.success) return null;
    return access.of === 'circle' ? id.data : this.sessions.circleOf(id.data);
  }
}
