import { z } from 'zod';
import { idSchema, pageOf } from './page';
import { roleSchema } from './circles';

/** All that is written into a circle's history. What is not listed cannot be noted. */
export const eventKinds = [
  'circle.created',
  'member.added',
  'member.changed',
  'member.removed',
  'member.left',
  'usual-tunings.changed',
  'tune.created',
  'tune.changed',
  'tune.removed',
  'tune.restored',
  'tunes.imported',
  'tunes.import-undone',
  'session.created',
  'session.changed',
  'session.removed',
  'session.code-changed',
  'session.started',
  'session.finished',
] as const;
export type EventKind = (typeof eventKinds)[number];

/** One line of "What happened". What was there before stays on the server: it may be a whole library. */
export const happenedSchema = z.object({
  id: idSchema,
  at: z.string(),
  what: z.enum(eventKinds),
  /** Who did it; null once their account is gone. */
  who: z.string().nullable(),
  subjectId: idSchema.nullable(),
  /** The tune's or the evening's title then, or the member's name now; null where it is the circle's. */
  subject: z.string().nullable(),
  /** Names of the fields that are not as they were. */
  changed: z.array(z.string()),
  /** Of a member who was added or changed. */
  role: roleSchema.nullable(),
  /** Of an import. */
  counts: z.object({ created: z.number().int(), updated: z.number().int() }).nullable(),
});
export type Happened = z.infer<typeof happenedSchema>;
export const happenedPageSchema = pageOf(happenedSchema);
