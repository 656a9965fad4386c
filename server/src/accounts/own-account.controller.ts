import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Res } from '@nestjs/common';
import { ApiParam, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { SignIns, User } from '@pegwell/shared/contract/accounts';
import type { Response } from 'express';
import { Caller, ForAccounts, type Account } from '../common/access';
import { contentDisposition } from '../common/content-disposition';
import { PathIdPipe } from '../common/path-id.pipe';
import { Limited } from '../limits/limited';
import {
  ChangeEmailDto,
  ChangePasswordDto,
  DeleteAccountDto,
  RenameDto,
  SignInsDto,
  UserDto,
} from './accounts.dto';
import { LeavingService } from './leaving.service';
import { OwnAccountService } from './own-account.service';
import { OwnDataService } from './own-data.service';
import { SignInsService } from './sign-ins.service';

/** What somebody sees and changes of their own account. */
@ApiTags('accounts')
@Controller('auth')
export class OwnAccountController {
  constructor(
    private readonly own: OwnAccountService,
    private readonly signIns: SignInsService,
    private readonly data: OwnDataService,
    private readonly leaving: LeavingService,
  ) {}

  @Patch('me')
  @ForAccounts()
  @ApiResponse({ status: 200, type: UserDto.Output })
  rename(@Caller() account: Account, @Body() body: RenameDto): Promise<User> {
    return this.own.rename(account, body);
  }

  @Post('password')
  @HttpCode(204)
  @ForAccounts()
  @Limited('password')
  @ApiResponse({
    status: 204,
    description: 'The password is the new one, and all other sign-ins have ended.',
  })
  changePassword(@Caller() account: Account, @Body() body: ChangePasswordDto): Promise<void> {
    return this.own.changePassword(account, body);
  }

  @Post('email')
  @HttpCode(204)
  @ForAccounts()
  @Limited('password')
  @Limited('mail')
  @ApiResponse({ status: 204, description: 'A mail to the new address is on its way; the old one is told.' })
  changeEmail(@Caller() account: Account, @Body() body: ChangeEmailDto): Promise<void> {
    return this.own.askForAddress(account, body);
  }

  @Get('sign-ins')
  @ForAccounts()
  @ApiResponse({ status: 200, type: SignInsDto.Output })
  async listSignIns(@Caller() account: Account): Promise<SignIns> {
    return { items: await this.signIns.list(account) };
  }

  @Delete('sign-ins')
  @HttpCode(204)
  @ForAccounts()
  @ApiResponse({ status: 204, description: 'All sign-ins but this one have ended.' })
  endOtherSignIns(@Caller() account: Account): Promise<void> {
    return this.signIns.endOthers(account);
  }

  @Delete('sign-ins/:id')
  @HttpCode(204)
  @ForAccounts()
  @ApiParam({ name: 'id', format: 'uuid' })
  @ApiResponse({ status: 204, description: 'That sign-in has ended.' })
  endSignIn(@Caller() account: Account, @Param('id', PathIdPipe) signInId: string): Promise<void> {
    return this.signIns.endOne(account, signInId);
  }

  @Get('me/data')
  @ForAccounts()
  @ApiResponse({ status: 200, description: 'Everything that is kept about the account, as a JSON file.' })
  async ownData(@Caller() account: Account, @Res({ passthrough: true }) response: Response) {
    const data = await this.data.of(account);
    response.set('Content-Disposition', contentDisposition('pegwell-my-data.json'));
    return data;
  }

  @Post('me/delete')
  @HttpCode(204)
  @ForAccounts()
  @Limited('password')
  @ApiResponse({
    status: 204,
    description: 'The account is gone; what its circles need stays, without the name.',
  })
  deleteAccount(
    @Caller() account: Account,
    @Body() body: DeleteAccountDto,
    @Res({ passthrough: true }) response: Response,
  ): Promise<void> {
    return this.leaving.deleteAccount(account, body, response);
  }
}
