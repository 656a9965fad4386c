import { z } from 'zod';
import { idSchema, lineSchema } from './page';
import { roleSchema } from './circles';

export const PASSWORD_MIN_CHARACTERS = 10;
/** bcrypt reads no further; a longer password is refused openly instead of being cut in silence. */
export const PASSWORD_MAX_BYTES = 72;

const emailSchema = z
  .string({ error: 'An e-mail address is missing.' })
  .trim()
  .max(254, 'This e-mail address is longer than 254 characters.')
  .pipe(z.email('This is not an e-mail address.'));

/** How long a text is in UTF-8. Counted here, because TextEncoder is no part of the language itself. */
function utf8Bytes(text: string): number {
  return [...text].reduce((sum, character) => {
    const point = character.codePointAt(0) ?? 0;
    return sum + (point < 0x80 ? 1 : point < 0x800 ? 2 : point < 0x10000 ? 3 : 4);
  }, 0);
}

export const registerSchema = z.strictObject({
  email: emailSchema,
  password: z
    .string({ error: 'A password is missing.' })
    .refine((text) => [...text].length >= PASSWORD_MIN_CHARACTERS, {
      error: `At least ${PASSWORD_MIN_CHARACTERS} characters.`,
    })
    .refine((text) => utf8Bytes(text) <= PASSWORD_MAX_BYTES, {
      error: `At most ${PASSWORD_MAX_BYTES} bytes: about ${PASSWORD_MAX_BYTES} plain letters.`,
    }),
  displayName: lineSchema(80, 'A name'),
});
export type Register = z.infer<typeof registerSchema>;

export const loginSchema = z.strictObject({
  email: lineSchema(254, 'An e-mail address'),
  password: z.string({ error: 'A password is missing.' }).min(1, 'A password is missing.').max(1000),
});
export type Login = z.infer<typeof loginSchema>;

export const userSchema = z.object({ id: idSchema, email: z.string(), displayName: z.string() });
export type User = z.infer<typeof userSchema>;

export const signedInSchema = z.object({ user: userSchema });
export type SignedIn = z.infer<typeof signedInSchema>;

export const meSchema = z.object({
  user: userSchema,
  circles: z.array(z.object({ id: idSchema, name: z.string(), role: roleSchema })),
});
export type Me = z.infer<typeof meSchema>;
