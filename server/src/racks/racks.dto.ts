import { createRackSchema, putRackSchema, rackSchema, racksSchema } from '@pegwell/shared/contract/racks';
import { createZodDto } from 'nestjs-zod';

export class CreateRackDto extends createZodDto(createRackSchema) {}
export class PutRackDto extends createZodDto(putRackSchema) {}
export class RackDto extends createZodDto(rackSchema) {}
export class RacksDto extends createZodDto(racksSchema) {}
