/**
 * Whether an `If-None-Match` header names this entity tag (RFC 9110, section 13.1.2: compared weakly, so
 * that a `W/` that a proxy put before it plays no part; `*` is any).
 * @example matchesTag('W/"a", "b"', '"a"') // true
 */
export function matchesTag(header: string | undefined, etag: string): boolean {
  if (header === undefined) return false;
  return header.split(',').some((part) => {
    const tag = part.trim();
    return tag === '*' || tag.replace(/^W\//, '') === etag;
  });
}
