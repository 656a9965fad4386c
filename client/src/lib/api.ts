import { ProblemError, readProblem } from './problem';

export interface RequestOptions {
  readonly query?: Readonly<Record<string, string | number | boolean | null | undefined>>;
  readonly body?: unknown;
  readonly headers?: Readonly<Record<string, string>>;
  readonly signal?: AbortSignal;
}

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** `/api/tunes?search=joy`; empty and absent values are left out. */
export function urlOf(path: string, query: RequestOptions['query'] = {}): string {
  const asked = Object.entries(query)
    .filter(([, value]) => value !== undefined && value !== null && value !== '')
    .map(([name, value]) => `${encodeURIComponent(name)}=${encodeURIComponent(String(value))}`);
  return `/api${path}${asked.length ? `?${asked.join('&')}` : ''}`;
}

/**
 * Sends a request to this site's API and gives the raw answer, whatever its status. Rejects with a
 * ProblemError of status 0 and code `offline` when the server cannot be reached, and with the
 * browser's AbortError when `signal` ends it.
 */
export async function send(method: Method, path: string, options: RequestOptions = {}): Promise<Response> {
  const { body, headers, query, signal } = options;
  const isForm = body instanceof FormData;
  try {
    return await fetch(urlOf(path, query), {
      method,
      credentials: 'same-origin',
      headers: {
        accept: 'application/json',
        // A form names its own boundary; everything else is JSON.
        ...(body === undefined || isForm ? {} : { 'content-type': 'application/json' }),
        ...headers,
      },
      ...(body === undefined ? {} : { body: isForm ? body : JSON.stringify(body) }),
      ...(signal ? { signal } : {}),
    });
  } catch (error) {
    if (signal?.aborted) throw error;
    throw new ProblemError({
      status: 0,
      code: 'offline',
      detail: 'The server cannot be reached. Check the connection and try again.',
    });
  }
}

async function readBody(response: Response): Promise<unknown> {
  if (response.status === 204) return undefined;
  const text = await response.text();
  if (!text) return undefined;
  try {
    return JSON.parse(text);
  } catch {
    // Something in between answered in its own words (a proxy's error page).
    return undefined;
  }
}

/** Sends and reads JSON; the caller names the shape the contract gives. Rejects with a ProblemError. */
export async function request<T>(method: Method, path: string, options?: RequestOptions): Promise<T> {
  const response = await send(method, path, options);
  const body = await readBody(response);
  if (!response.ok) throw readProblem(response.status, body);
  return body as T;
}

type WithoutBody = Omit<RequestOptions, 'body'>;

export const api = {
  get: <T>(path: string, options?: WithoutBody) => request<T>('GET', path, options),
  post: <T>(path: string, body?: unknown, options?: WithoutBody) =>
    request<T>('POST', path, { ...options, body }),
  put: <T>(path: string, body?: unknown, options?: WithoutBody) =>
    request<T>('PUT', path, { ...options, body }),
  patch: <T>(path: string, body?: unknown, options?: WithoutBody) =>
    request<T>('PATCH', path, { ...options, body }),
  delete: <T = void>(path: string, options?: WithoutBody) => request<T>('DELETE', path, options),
};
