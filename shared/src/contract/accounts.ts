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

/**
 * A password as text: keyboards write the same letter in more than one way, and all of them are the same password
 * (NIST SP 800-63B, section 3.1.1.2).
 */
const passwordText = () => z.string({ error: 'A password is missing.' }).normalize('NFKC');

/** A new password. */
const passwordSchema = passwordText()
  .refine((text) => [...text].length >= PASSWORD_MIN_CHARACTERS, {
    error: `At least ${PASSWORD_MIN_CHARACTERS} characters.`,
  })
  .refine((text) => utf8Bytes(text) <= PASSWORD_MAX_BYTES, {
    error: `At most ${PASSWORD_MAX_BYTES} bytes: about ${PASSWORD_MAX_BYTES} plain letters.`,
  });

/** A password as somebody remembers it: right or wrong, but never of the wrong form. */
const presentPasswordSchema = passwordText()
  .min(1, 'A password is missing.')
  .max(1000, 'No password is as long as this.');

const displayNameSchema = lineSchema(80, 'A name');

export const registerSchema = z.strictObject({
  email: emailSchema,
  password: passwordSchema,
  displayName: displayNameSchema,
});
export type Register = z.infer<typeof registerSchema>;

export const loginSchema = z.strictObject({
  email: lineSchema(254, 'An e-mail address'),
  password: presentPasswordSchema,
});
export type Login = z.infer<typeof loginSchema>;

export const userSchema = z.object({
  id: idSchema,
  email: z.string(),
  displayName: z.string(),
  /** Whether it is known that mail to the address reaches them. */
  confirmed: z.boolean(),
});
export type User = z.infer<typeof userSchema>;

export const signedInSchema = z.object({ user: userSchema });
export type SignedIn = z.infer<typeof signedInSchema>;

export const meSchema = z.object({
  user: userSchema,
  circles: z.array(z.object({ id: idSchema, name: z.string(), role: roleSchema })),
});
export type Me = z.infer<typeof meSchema>;

export const renameSchema = z.strictObject({ displayName: displayNameSchema });
export type Rename = z.infer<typeof renameSchema>;

/** Ends all other sign-ins. */
export const changePasswordSchema = z.strictObject({
  current: presentPasswordSchema,
  password: passwordSchema,
});
export type ChangePassword = z.infer<typeof changePasswordSchema>;

/** Asks for a mail to the new address; it is the account's once the link in it was used. */
export const changeEmailSchema = z.strictObject({ email: emailSchema, current: presentPasswordSchema });
export type ChangeEmail = z.infer<typeof changeEmailSchema>;

export const deleteAccountSchema = z.strictObject({ current: presentPasswordSchema });
export type DeleteAccount = z.infer<typeof deleteAccountSchema>;

export const forgotSchema = z.strictObject({ email: emailSchema });
export type Forgot = z.infer<typeof forgotSchema>;

/** What stands behind the `#` of a link in a mail. Of any other form, it is as good as used. */
const tokenSchema = z.string({ error: 'The link is not whole.' }).min(1, 'The link is not whole.').max(200);

/** Ends all sign-ins. */
export const resetSchema = z.strictObject({ token: tokenSchema, password: passwordSchema });
export type Reset = z.infer<typeof resetSchema>;

export const confirmSchema = z.strictObject({ token: tokenSchema });
export type Confirm = z.infer<typeof confirmSchema>;

export const confirmedSchema = z.object({ email: z.string() });
export type Confirmed = z.infer<typeof confirmedSchema>;

export const signInSchema = z.object({
  id: idSchema,
  /** In words: "Firefox on Linux". */
  device: z.string(),
  begunAt: z.string(),
  /** To about ten minutes. */
  usedAt: z.string(),
  /** The one that asks. */
  here: z.boolean(),
});
export type SignIn = z.infer<typeof signInSchema>;
export const signInsSchema = z.object({ items: z.array(signInSchema) });
export type SignIns = z.infer<typeof signInsSchema>;
