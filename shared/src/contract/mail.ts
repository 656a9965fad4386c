import { z } from 'zod';

/** Whether this server sends mail: without, nobody can confirm an address or reset a password by themselves. */
export const mailStateSchema = z.object({ sends: z.boolean() });
export type MailState = z.infer<typeof mailStateSchema>;
