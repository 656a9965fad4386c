import { mailStateSchema } from '@pegwell/shared/contract/mail';
import { createZodDto } from 'nestjs-zod';

export class MailStateDto extends createZodDto(mailStateSchema) {}
