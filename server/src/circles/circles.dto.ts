import {
  addMemberSchema,
  changeMemberSchema,
  circleSchema,
  createCircleSchema,
  memberSchema,
  memberPageSchema,
  setUsualTuningsSchema,
  usualTuningsSchema,
} from '@pegwell/shared/contract/circles';
import { happenedPageSchema } from '@pegwell/shared/contract/history';
import { createZodDto } from 'nestjs-zod';

export class CreateCircleDto extends createZodDto(createCircleSchema) {}
export class CircleDto extends createZodDto(circleSchema) {}
export class AddMemberDto extends createZodDto(addMemberSchema) {}
export class ChangeMemberDto extends createZodDto(changeMemberSchema) {}
export class MemberDto extends createZodDto(memberSchema) {}
export class MemberPageDto extends createZodDto(memberPageSchema) {}
export class HappenedPageDto extends createZodDto(happenedPageSchema) {}
export class UsualTuningsDto extends createZodDto(usualTuningsSchema) {}
export class SetUsualTuningsDto extends createZodDto(setUsualTuningsSchema) {}
