import { sheetQuerySchema } from '@pegwell/shared/contract/sheets';
import { createZodDto } from 'nestjs-zod';

export class SheetQueryDto extends createZodDto(sheetQuerySchema) {}
