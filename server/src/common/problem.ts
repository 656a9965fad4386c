import { HttpException } from '@nestjs/common';
import {
  problemCodes,
  type FieldError,
  type Problem,
  type ProblemCode,
} from '@pegwell/shared/contract/errors';

/** Does not compile when a code is missing. */
const statusOf: Record<ProblemCode, number> = {
  'not-json': 400,
  'not-valid': 400,
  'not-signed-in': 401,
  'wrong-credentials': 401,
  'not-allowed': 403,
  'wrong-origin': 403,
  'not-found': 404,
  'email-taken': 409,
  'already-member': 409,
  'wrong-password': 422,
  'link-over': 410,
  'no-mail': 422,
  'sole-host': 422,
  changed: 409,
  'too-large': 413,
  'wrong-media-type': 415,
  'cannot-be': 422,
  'rules-clash': 422,
  undecided: 422,
  'live-impossible': 422,
  'too-many': 429,
  unavailable: 503,
  internal: 500,
};

const titleOf: Partial<Record<number, string>> = {
  400: 'Bad request',
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not found',
  409: 'Changed meanwhile',
  410: 'Over',
  413: 'Too large',
  415: 'Not read here',
  422: 'Cannot be',
  429: 'Too many requests',
  500: 'Our fault',
  503: 'Away for a moment',
};

export interface ProblemExtras {
  readonly errors?: readonly FieldError[];
  readonly current?: unknown;
  readonly clashes?: readonly { readonly rule: string; readonly ids: readonly string[] }[];
}

/** A refusal with a code of the list and a sentence for the person who reads it (RFC 9457). */
export class ProblemException extends HttpException {
  readonly problem: Problem;

  constructor(
    readonly code: ProblemCode,
    detail: string = problemCodes[code],
    extras: ProblemExtras = {},
  ) {
    const status = statusOf[code];
    super(detail, status);
    this.problem = {
      type: `urn:pegwell:problem:${code}`,
      title: titleOf[status] ?? 'Refused',
      status,
      detail,
      code,
      ...(extras.errors && { errors: [...extras.errors] }),
      ...('current' in extras && { current: extras.current }),
      ...(extras.clashes && { clashes: extras.clashes.map(({ rule, ids }) => ({ rule, ids: [...ids] })) }),
    };
  }
}

export const notFound = () =>
  new ProblemException('not-found', 'There is nothing here, or it is not yours to see.');

/** Of the schema, but it cannot be. `detail` is the first sentence; every place is in `errors`. */
export function cannotBe(errors: readonly FieldError[]): ProblemException {
  return new ProblemException('cannot-be', errors[0]?.message, { errors });
}
