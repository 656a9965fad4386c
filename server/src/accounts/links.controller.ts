import { Body, Controller, HttpCode, Post } from '@nestjs/common';
import { ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Confirmed } from '@pegwell/shared/contract/accounts';
import { Caller, ForAccounts, ForAnyone, type Account } from '../common/access';
import { Limited } from '../limits/limited';
import { ConfirmDto, ConfirmedDto, ForgotDto, ResetDto } from './accounts.dto';
import { AddressService } from './address.service';
import { RecoveryService } from './recovery.service';

/** What is asked for by mail, and what the links in mail lead to: pages that send a POST, so that no GET does it. */
@ApiTags('accounts')
@Controller('auth')
export class LinksController {
  constructor(
    private readonly recovery: RecoveryService,
    private readonly addresses: AddressService,
  ) {}

  @Post('forgot')
  @HttpCode(204)
  @ForAnyone()
  @Limited('mail')
  @ApiResponse({ status: 204, description: 'If an account has the address, a mail is on its way.' })
  forgot(@Body() body: ForgotDto): Promise<void> {
    return this.recovery.forgot(body);
  }

  @Post('reset')
  @HttpCode(204)
  @ForAnyone()
  @Limited('link')
  @ApiResponse({ status: 204, description: 'The password is the new one, and all sign-ins have ended.' })
  reset(@Body() body: ResetDto): Promise<void> {
    return this.recovery.reset(body);
  }

  @Post('confirm')
  @HttpCode(200)
  @ForAnyone()
  @Limited('link')
  @ApiResponse({ status: 200, type: ConfirmedDto.Output })
  confirm(@Body() body: ConfirmDto): Promise<Confirmed> {
    return this.addresses.confirm(body);
  }

  @Post('confirm/again')
  @HttpCode(204)
  @ForAccounts()
  @Limited('mail')
  @ApiResponse({ status: 204, description: 'The mail with the link is on its way once more.' })
  again(@Caller() account: Account): Promise<void> {
    return this.addresses.askAgain(account);
  }
}
