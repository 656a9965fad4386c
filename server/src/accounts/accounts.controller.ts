import { Body, Controller, Get, HttpCode, Post, Req, Res } from '@nestjs/common';
import { ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Me, SignedIn } from '@pegwell/shared/contract/accounts';
import type { Request, Response } from 'express';
import { CirclesService } from '../circles/circles.service';
import { Caller, ForAccounts, ForAnyone, type Account } from '../common/access';
import { Limited } from '../limits/limited';
import { LoginDto, MeDto, RegisterDto, SignedInDto } from './accounts.dto';
import { AccountsService } from './accounts.service';
import { SignInsService } from './sign-ins.service';

@ApiTags('accounts')
@Controller('auth')
export class AccountsController {
  constructor(
    private readonly accounts: AccountsService,
    private readonly signIns: SignInsService,
    private readonly circles: CirclesService,
  ) {}

  @Post('register')
  @ForAnyone()
  @Limited('register')
  @ApiResponse({ status: 201, type: SignedInDto.Output })
  async register(
    @Body() body: RegisterDto,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): Promise<SignedIn> {
    const user = await this.accounts.register(body);
    await this.signIns.begin(user.id, request, response);
    return { user };
  }

  @Post('login')
  @HttpCode(200)
  @ForAnyone()
  @Limited('password')
  @ApiResponse({ status: 200, type: SignedInDto.Output })
  async login(
    @Body() body: LoginDto,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): Promise<SignedIn> {
    const user = await this.accounts.checkPassword(body);
    await this.signIns.begin(user.id, request, response);
    return { user };
  }

  @Post('logout')
  @HttpCode(204)
  @ForAccounts()
  @ApiResponse({ status: 204, description: 'This sign-in has ended.' })
  logout(@Caller() account: Account, @Res({ passthrough: true }) response: Response): Promise<void> {
    return this.signIns.end(account.signInId, response);
  }

  @Get('me')
  @ForAccounts()
  @ApiResponse({ status: 200, type: MeDto.Output })
  async me(@Caller() { id, email, displayName, confirmed }: Account): Promise<Me> {
    return { user: { id, email, displayName, confirmed }, circles: await this.circles.listOf(id) };
  }
}
