import {
  createTuneSchema,
  exportQuerySchema,
  importProgressSchema,
  importQuerySchema,
  importReportSchema,
  importUndoneSchema,
  recentImportsSchema,
  tunePageSchema,
  tuneQuerySchema,
  tuneSchema,
  updateTuneSchema,
} from '@pegwell/shared/contract/tunes';
import { createZodDto } from 'nestjs-zod';

export class TuneDto extends createZodDto(tuneSchema) {}
export class TunePageDto extends createZodDto(tunePageSchema) {}
export class TuneQueryDto extends createZodDto(tuneQuerySchema) {}
export class CreateTuneDto extends createZodDto(createTuneSchema) {}
export class UpdateTuneDto extends createZodDto(updateTuneSchema) {}
export class ImportQueryDto extends createZodDto(importQuerySchema) {}
export class ImportReportDto extends createZodDto(importReportSchema) {}
export class ImportUndoneDto extends createZodDto(importUndoneSchema) {}
export class RecentImportsDto extends createZodDto(recentImportsSchema) {}
export class ImportProgressDto extends createZodDto(importProgressSchema) {}
export class ExportQueryDto extends createZodDto(exportQuerySchema) {}
