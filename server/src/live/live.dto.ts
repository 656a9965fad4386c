import {
  circlePlayPageSchema,
  followQuerySchema,
  followSchema,
  liveStateSchema,
  liveStepSchema,
  playsSchema,
} from '@pegwell/shared/contract/live';
import { createZodDto } from 'nestjs-zod';

export class LiveStepDto extends createZodDto(liveStepSchema) {}
export class LiveStateDto extends createZodDto(liveStateSchema) {}
export class FollowQueryDto extends createZodDto(followQuerySchema) {}
export class FollowDto extends createZodDto(followSchema) {}
export class PlaysDto extends createZodDto(playsSchema) {}
export class CirclePlayPageDto extends createZodDto(circlePlayPageSchema) {}
