/**
 * What e-mail addresses are compared by: compatibility forms and case folded away. Addresses are plain ASCII (the
 * contract), so that what is folded together is the same address and never a neighbour's.
 */
export function emailKeyOf(email: string): string {
  return email.trim().normalize('NFKC').toLowerCase();
}
