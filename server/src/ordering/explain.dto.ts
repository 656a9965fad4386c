import {
  explanationRequestSchema,
  explanationSchema,
  heldBackRequestSchema,
  heldBackSchema,
} from '@pegwell/shared/contract/explain';
import { createZodDto } from 'nestjs-zod';

export class ExplanationRequestDto extends createZodDto(explanationRequestSchema) {}
export class ExplanationDto extends createZodDto(explanationSchema) {}
export class HeldBackRequestDto extends createZodDto(heldBackRequestSchema) {}
export class HeldBackDto extends createZodDto(heldBackSchema) {}
