import { z } from 'zod';

/**
 * Every way a request can be refused: when it happens, and what the reader can do about it.
 * The server's table from code to status does not compile when a code is missing.
 */
export const problemCodes = {
  'not-json': 'The body is not JSON.',
  'not-valid': 'The body or the query is not of the schema; `errors` names every place.',
  'not-signed-in': 'Nobody is signed in, or the sign-in was ended: sign in.',
  'wrong-credentials': 'No account has this e-mail and password.',
  'wrong-password': 'The present password, asked for before a change, is another.',
  'not-allowed': 'A member of the circle without this right: ask a host.',
  'wrong-origin': 'A changing request from a page that is not this site.',
  'not-found': 'Not there, or not yours to see.',
  'email-taken': 'An account with this e-mail exists: sign in.',
  'link-over': 'The link was used, is too old, or a newer one was sent: ask for another.',
  'no-mail': 'This server sends no mail, so this cannot be done by mail: ask whoever runs it.',
  'sole-host': 'The only host of a circle with other members: make somebody else a host first.',
  'already-member': 'This account is in the circle already.',
  changed: 'Somebody changed it meanwhile; `current` is how it stands now.',
  'too-large': 'The body or file is over its limit.',
  'wrong-media-type': 'A content type or file extension that is not read here.',
  'cannot-be': 'Of the schema, but it cannot be: `errors` says what and where.',
  'rules-clash': 'The rules cannot all hold; `clashes` lists those that clash.',
  undecided: 'The search ended before it was known whether the rules can hold.',
  'live-impossible': 'This step cannot be taken from where the evening stands.',
  'too-many': 'Too many requests: wait as long as `Retry-After` says.',
  unavailable: 'The database is away: try again shortly.',
  internal: 'Our fault. The `instance` finds it in the log.',
} as const;

export type ProblemCode = keyof typeof problemCodes;

/** RFC 9457 problem details, with every validation issue and not only the first. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  code: z.string(),
  instance: z.string().optional(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  /** With 409: the state as it stands. */
  current: z.unknown().optional(),
  /** With rules-clash: rules from which none can be left out. */
  clashes: z.array(z.object({ rule: z.string(), ids: z.array(z.string()) })).optional(),
});

export type Problem = z.infer<typeof problemSchema>;
export interface FieldError {
  readonly path: string;
  readonly message: string;
}
