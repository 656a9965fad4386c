import {
  addMemberSchema,
  circleSchema,
  createCircleSchema,
  memberSchema,
  memberPageSchema,
  setUsualTuningsSchema,
  usualTuningsSchema,
} from '@pegwell/shared/contract/circles';
import { createZodDto } from 'nestjs-zod';

export class CreateCircleDto extends createZodDto(createCircleSchema) {}
export class CircleDto extends createZodDto(circleSchema) {}
export class AddMemberDto extends createZodDto(addMemberSchema) {}
export class MemberDto extends createZodDto(memberSchema) {}
export class MemberPageDto extends createZodDto(memberPageSchema) {}
export class UsualTuningsDto extends createZodDto(usualTuningsSchema) {}
export class SetUsualTuningsDto extends createZodDto(setUsualTuningsSchema) {}
