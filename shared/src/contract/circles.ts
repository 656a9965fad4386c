import { z } from 'zod';
import { idSchema, lineSchema, pageOf } from './page';
import { keySchema } from './keys';

export const roleSchema = z.enum(['host', 'cohost', 'player']);
export type Role = z.infer<typeof roleSchema>;

/** An IANA time zone that this machine's Intl knows. */
export const timeZoneSchema = z
  .string()
  .max(64)
  .refine(knownTimeZone, { error: 'This time zone is not known.' });

function knownTimeZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone });
    return !/^[+-]/.test(zone);
  } catch {
    return false;
  }
}

export const createCircleSchema = z.strictObject({
  name: lineSchema(120, 'A name'),
  timeZone: timeZoneSchema.optional(),
});
export type CreateCircle = z.infer<typeof createCircleSchema>;

export const circleSchema = z.object({
  id: idSchema,
  name: z.string(),
  role: roleSchema,
  timeZone: z.string(),
  /** The room's A in Hz. */
  referenceA: z.number(),
  /** What the caller may do here (policy.ts). */
  can: z.array(z.string()),
});
export type Circle = z.infer<typeof circleSchema>;

export const addMemberSchema = z.strictObject({
  email: lineSchema(254, 'An e-mail address'),
  role: roleSchema,
});
export type AddMember = z.infer<typeof addMemberSchema>;

export const changeMemberSchema = z.strictObject({ role: roleSchema });

export const memberSchema = z.object({
  accountId: idSchema,
  displayName: z.string(),
  /** Only for those who may add members. */
  email: z.string().optional(),
  role: roleSchema,
});
export type CircleMember = z.infer<typeof memberSchema>;
export const memberPageSchema = pageOf(memberSchema);

/** What a kind is taken to be tuned to where a tune says nothing: by key, else the default row (key null). */
export const usualTuningSchema = z.object({
  kind: z.string(),
  key: z.string().nullable(),
  /** `minor` stands for modal, dorian, minor and aeolian; `major` for the rest. */
  family: z.enum(['major', 'minor']).nullable(),
  /** A tuning as shown, with its capo (`gDGBD capo 2`), or `any`. */
  tuning: z.string(),
  /** True where the circle changed it. */
  own: z.boolean(),
});
export type UsualTuning = z.infer<typeof usualTuningSchema>;
export const usualTuningsSchema = z.object({ items: z.array(usualTuningSchema) });

/** Replaces the circle's own rows; an empty list is the built-in table. */
export const setUsualTuningsSchema = z.strictObject({
  items: z
    .array(
      z.strictObject({
        kind: z.string().max(40),
        key: keySchema.nullable(),
        family: z.enum(['major', 'minor']).nullable(),
        tuning: z.string().max(80),
      }),
    )
    .max(500),
});
export type SetUsualTunings = z.infer<typeof setUsualTuningsSchema>;
