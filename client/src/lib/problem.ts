/** One thing wrong, at the place it concerns; `path` as `email` or `sets.0.title`. */
export interface ProblemIssue {
  readonly path: string;
  readonly message: string;
}

interface ProblemParts {
  readonly status: number;
  readonly code: string;
  readonly detail: string;
  readonly errors?: readonly ProblemIssue[];
  readonly body?: unknown;
}

/** What the server refused, or that it could not be reached (status 0). RFC 9457 problem details. */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';
  readonly status: number;
  /** A word for programs: `email-taken`, `stale-version`, `offline`. */
  readonly code: string;
  /** A sentence for people. */
  readonly detail: string;
  readonly errors: readonly ProblemIssue[];
  /** The whole document, for what a code carries beside (`current` of a 409, `clashes` of a 422). */
  readonly body: unknown;

  constructor({ status, code, detail, errors = [], body }: ProblemParts) {
    super(detail);
    this.status = status;
    this.code = code;
    this.detail = detail;
    this.errors = errors;
    this.body = body;
  }
}

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const text = (value: unknown): string => (typeof value === 'string' ? value : '');

function readIssues(value: unknown): ProblemIssue[] {
  if (!Array.isArray(value)) return [];
  return value.filter(isRecord).map((issue) => ({
    // A list of steps and a JSON pointer say the same as a dotted path; forms speak dotted.
    path: Array.isArray(issue['path'])
      ? issue['path'].join('.')
      : text(issue['path']).replace(/^\//, '').replaceAll('/', '.'),
    message: text(issue['message']),
  }));
}

/** The problem that a response with an error status carries; a sentence of our own where it has none. */
export function readProblem(status: number, body: unknown): ProblemError {
  const document = isRecord(body) ? body : {};
  return new ProblemError({
    status,
    code: text(document['code']) || `http-${status}`,
    detail:
      text(document['detail']) ||
      text(document['title']) ||
      'The server could not do that. Try again in a moment.',
    errors: readIssues(document['errors']),
    body,
  });
}

/** A sentence for anything that can be thrown. */
export function sentenceOf(error: unknown): string {
  if (error instanceof ProblemError) return error.detail;
  return 'Something went wrong on this page. Nothing you saved is lost.';
}
