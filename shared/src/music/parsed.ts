/**
 * What reading a text gives: a value, or the sentence that tells its writer what is wrong.
 * Music parses at the edge and never throws for what a person typed.
 */
export type Parsed<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly reason: string };

export function read<T>(value: T): Parsed<T> {
  return { ok: true, value };
}

/** `reason` is a whole sentence, shown as it stands at the field or line it concerns. */
export function refused(reason: string): { readonly ok: false; readonly reason: string } {
  return { ok: false, reason };
}
