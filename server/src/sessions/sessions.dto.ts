import {
  createSessionSchema,
  putBoardSchema,
  sessionPageSchema,
  sessionSchema,
  updateSessionSchema,
} from '@pegwell/shared/contract/sessions';
import { createZodDto } from 'nestjs-zod';

export class CreateSessionDto extends createZodDto(createSessionSchema) {}
export class UpdateSessionDto extends createZodDto(updateSessionSchema) {}
export class PutBoardDto extends createZodDto(putBoardSchema) {}
export class SessionDto extends createZodDto(sessionSchema) {}
export class SessionPageDto extends createZodDto(sessionPageSchema) {}
