import { vi } from 'vitest';

export interface Answer {
  readonly status: number;
  readonly body?: unknown;
}

/** What the API answers in a test, by `GET /api/auth/me`. */
export type Answers = Readonly<Record<string, (body: unknown, url: URL) => Answer>>;

/** 200 with a body, whatever is sent. */
export const ok = (body: unknown) => (): Answer => ({ status: 200, body });

/**
 * Stands in for the server. What is not in `answers` is 404, so that a page that asks for more than the
 * test knows is found out. Gives what was asked, in order.
 */
export function mockApi(answers: Answers): readonly string[] {
  const asked: string[] = [];
  vi.stubGlobal('fetch', (path: string, init: RequestInit = {}) => {
    const url = new URL(path, 'http://pegwell.test');
    const name = `${init.method ?? 'GET'} ${url.pathname}`;
    asked.push(name);
    const answer = answers[name];
    const sent: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : init.body;
    const { status, body } = answer
      ? answer(sent, url)
      : { status: 404, body: { status: 404, code: 'not-found', detail: 'There is nothing here.' } };
    return Promise.resolve(
      new Response(body === undefined ? null : JSON.stringify(body), {
        status,
        headers: { 'content-type': status < 400 ? 'application/json' : 'application/problem+json' },
      }),
    );
  });
  return asked;
}
