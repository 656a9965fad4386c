import { pricedTunePageSchema, priceQuerySchema, tunePricesSchema } from '@pegwell/shared/contract/prices';
import { createZodDto } from 'nestjs-zod';

export class PriceQueryDto extends createZodDto(priceQuerySchema) {}
export class PricedTunePageDto extends createZodDto(pricedTunePageSchema) {}
export class TunePricesDto extends createZodDto(tunePricesSchema) {}
