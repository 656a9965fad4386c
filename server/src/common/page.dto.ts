import { pageQuerySchema } from '@pegwell/shared/contract/page';
import { createZodDto } from 'nestjs-zod';

/** `?page=1&pageSize=50` */
export class PageQueryDto extends createZodDto(pageQuerySchema) {}
