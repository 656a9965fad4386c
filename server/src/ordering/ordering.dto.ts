import {
  acceptSuggestionSchema,
  scoreAnswerSchema,
  scoreRequestSchema,
  sessionSuggestionRequestSchema,
  sessionSuggestionSchema,
  suggestAnswerSchema,
  suggestRequestSchema,
} from '@pegwell/shared/contract/ordering';
import { createZodDto } from 'nestjs-zod';

export class ScoreRequestDto extends createZodDto(scoreRequestSchema) {}
export class ScoreAnswerDto extends createZodDto(scoreAnswerSchema) {}
export class SuggestRequestDto extends createZodDto(suggestRequestSchema) {}
export class SuggestAnswerDto extends createZodDto(suggestAnswerSchema) {}
export class SessionSuggestionRequestDto extends createZodDto(sessionSuggestionRequestSchema) {}
export class SessionSuggestionDto extends createZodDto(sessionSuggestionSchema) {}
export class AcceptSuggestionDto extends createZodDto(acceptSuggestionSchema) {}
