import { compare, getRounds, hash, truncates } from 'bcryptjs';
import { ProblemException } from '../common/problem';
import { isCommonPassword } from './common-passwords';

/**
 * Measured with bcryptjs 3.0.3 on one core here (best of six): 67 ms at cost 10, 136 ms at 11, 270 ms at 12. The
 * thread that hashes also answers phones (bcryptjs lets others in after 100 ms), so 11; OWASP asks for 10 or more.
 */
const COST = 11;
/** Compared against when there is no account, so that the answer takes as long. Of a password nobody has. */
const NOBODY = '$2b$11$9FwFVGxArIft3hgyTH1zmOE4nr6TYJaoteWw2C.EAD/8Pu6QfIwZC';

export function hashPassword(password: string): Promise<string> {
  return hash(password, COST);
}

/**
 * `stored` is null where nobody has the address: wrong, after the same time. bcrypt reads 72 bytes and no further:
 * what is longer was never set, and is not let in for how it begins.
 */
export async function isPassword(password: string, stored: string | null): Promise<boolean> {
  const right = await compare(password, stored ?? NOBODY);
  return right && stored !== null && !truncates(password);
}

/** Whether a stored password was hashed at another cost than new ones are. */
export function isHashedOtherwise(stored: string): boolean {
  return getRounds(stored) !== COST;
}

/**
 * NIST SP 800-63B, section 3.1.1.2: length (the contract's schema), a list of common ones, and what anybody knows
 * of the person; no rules about kinds of characters, no expiry.
 * @param known the person's own address and name
 */
export function refuseCommonPassword(password: string, known: readonly string[]): void {
  const folded = password.toLowerCase();
  const isKnown = known.some((text) => text.toLowerCase() === folded);
  if (!isKnown && !isCommonPassword(password)) return;
  const message = isKnown
    ? 'This is your name or address. Take something that only you know.'
    : 'This password is among the first that anybody would try. Take another.';
  throw new ProblemException('not-valid', message, { errors: [{ path: 'password', message }] });
}
