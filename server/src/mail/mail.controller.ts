import { Controller, Get } from '@nestjs/common';
import { ApiResponse, ApiTags } from '@nestjs/swagger';
import type { MailState } from '@pegwell/shared/contract/mail';
import { ForAnyone } from '../common/access';
import { MailStateDto } from './mail.dto';
import { MailService } from './mail.service';

@ApiTags('mail')
@Controller('mail')
export class MailController {
  constructor(private readonly mail: MailService) {}

  @Get()
  @ForAnyone()
  @ApiResponse({ status: 200, type: MailStateDto.Output })
  state(): MailState {
    return { sends: this.mail.sends };
  }
}
