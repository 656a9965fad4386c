import { Module } from '@nestjs/common';
import { MailController } from './mail.controller';
import { MailRepository } from './mail.repository';
import { MailSender } from './mail-sender';
import { MailService } from './mail.service';
import { MailTransport } from './transport';

@Module({
  controllers: [MailController],
  providers: [MailRepository, MailService, MailSender, MailTransport],
  exports: [MailService],
})
export class MailModule {}
