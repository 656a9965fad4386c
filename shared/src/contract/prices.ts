import { z } from 'zod';
import { idSchema, pageOf } from './page';
import { goalSchema, scoreSchema } from './sessions';
import { tuneSchema, tuneSearchSchema, tuningHasKind } from './tunes';

/** What one more tune costs where it would stand: with it there less without it. */
export const priceSchema = z.object({
  /** Null on a board without a set: the tune begins the first. */
  setId: idSchema.nullable(),
  /** Where in that set it would stand, and as which position of the evening; both from 0. */
  index: z.number().int(),
  position: z.number().int(),
  pegChanges: z.number().int(),
  /**
   * The same for every level of the score; null where the evening accepts so many tunings that pegs alone
   * were weighed.
   */
  levels: scoreSchema.omit({ offClockPegChanges: true }).nullable(),
});
export type PlacePrice = z.infer<typeof priceSchema>;

/** One tune of the circle, in its usual setting, at every place of an evening. */
export const tunePricesSchema = z.object({
  version: z.number().int(),
  goal: goalSchema,
  tuneId: idSchema,
  places: z.array(priceSchema),
  /** Where the whole evening then scores best; null where every place is taken. */
  cheapest: priceSchema.nullable(),
  /** As the next one: after the tune that is now or, before the evening runs, after the last. */
  next: priceSchema.nullable(),
});
export type TunePrices = z.infer<typeof tunePricesSchema>;

/**
 * The circle's tunes with what each costs on this evening: at its cheapest place, or as the next one. `sort`:
 * the cheapest first (level by level in the evening's goal, then by title), or by title.
 */
export const priceQuerySchema = tuneSearchSchema
  .extend({
    place: z.enum(['cheapest', 'next']).default('cheapest'),
    sort: z.enum(['price', 'title']).default('price'),
  })
  .refine(...tuningHasKind);
export type PriceQuery = z.infer<typeof priceQuerySchema>;

export const pricedTunePageSchema = pageOf(
  z.object({ tune: tuneSchema, price: priceSchema.nullable() }),
).extend({ version: z.number().int(), goal: goalSchema });
export type PricedTunePage = z.infer<typeof pricedTunePageSchema>;
