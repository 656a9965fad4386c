import type { Follow } from '@pegwell/shared/contract/live';
import { send } from '../../../lib/api';
import { readProblem } from '../../../lib/problem';

/** An answer with its entity tag, with which the next question asks only for what changed. */
export interface FollowAnswer {
  readonly follow: Follow;
  readonly etag: string | null;
}

/**
 * Asks once, for one kind. Null when nothing changed since `etag` (304). Rejects with a ProblemError.
 * @param code as typed
 */
export async function askFollow(
  code: string,
  kind: string,
  etag: string | null,
  signal: AbortSignal,
): Promise<FollowAnswer | null> {
  const response = await send('GET', `/follow/${encodeURIComponent(code)}`, {
    query: { kind },
    signal,
    ...(etag === null ? {} : { headers: { 'if-none-match': etag } }),
  });
  if (response.status === 304) return null;
  const body: unknown = await response.json().catch(() => null);
  if (!response.ok || body === null) throw readProblem(response.status, body);
  return { follow: body as Follow, etag: response.headers.get('etag') };
}
