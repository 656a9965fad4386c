import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { linkIn, startMailCatcher, type MailCatcher } from '../scripts/mail/catcher';
import { freshDatabase, startSite, type Site, type SiteDatabase } from './site';

const EMAIL = 'quiet.ada@example.org';
const PASSWORDS = ['crooked tunes at dusk', 'straight tunes at dawn', 'wrong tunes at noon'];

/** One line of the log. */
interface Line {
  readonly req?: { readonly id: string; readonly path: string };
  readonly res?: { readonly status: number };
}

describe('the log of a whole journey, at the level that tells the most', () => {
  let database: SiteDatabase;
  let catcher: MailCatcher;
  let site: Site;
  let log = '';
  let cookie = '';
  const cookies: string[] = [];
  const ids: string[] = [];
  beforeAll(async () => {
    database = await freshDatabase();
    catcher = await startMailCatcher();
    site = await startSite(database.url, { mailUrl: catcher.url, onLog: (text) => (log += text) });
  });
  afterAll(async () => {
    await catcher.close();
    await database.drop();
  });

  async function send(
    method: string,
    path: string,
    body?: object | string,
  ): Promise<Record<string, unknown>> {
    const answer = await fetch(`${site.url}${path}`, {
      method,
      headers: { cookie, 'content-type': 'application/json' },
      ...(body !== undefined && { body: typeof body === 'string' ? body : JSON.stringify(body) }),
    });
    const set = answer.headers.getSetCookie()[0]?.split(';')[0];
    if (set) cookies.push((cookie = set));
    if (path.startsWith('/api/')) ids.push(answer.headers.get('x-request-id') ?? 'none');
    const text = await answer.text();
    return text.startsWith('{') ? (JSON.parse(text) as Record<string, unknown>) : {};
  }

  it('has a line for every request, and no password, token, cookie, code, address or mail', async () => {
    const [first = '', second = '', wrong = ''] = PASSWORDS;
    await send('POST', '/api/auth/register', { email: EMAIL, password: first, displayName: 'Quiet Ada' });
    const confirm = linkIn(await catcher.next(({ subject }) => subject.includes('Confirm')));
    await send('POST', '/api/auth/confirm', { token: confirm.token });
    await send('POST', '/api/auth/login', { email: EMAIL, password: wrong });
    // Not JSON, and not of the schema: what is refused is not told either.
    await send('POST', '/api/auth/login', `{"password": "${wrong}"`);
    await send('POST', '/api/auth/login', { email: EMAIL, password: { is: wrong } });
    await send('POST', '/api/auth/register', { email: EMAIL, password: first, displayName: 'Again' });
    await send('POST', '/api/auth/forgot', { email: EMAIL });
    const reset = linkIn(await catcher.next(({ subject }) => subject.includes('Choose')));
    await send('POST', '/api/auth/reset', { token: reset.token, password: second });
    await send('POST', '/api/auth/login', { email: EMAIL, password: second });
    const circle = await send('POST', '/api/circles', { name: 'Ash Ford Circle' });
    const home = `/api/circles/${String(circle['id'])}`;
    await send('POST', `${home}/members`, { email: 'nobody.at.all@example.org', role: 'player' });
    await send('GET', `${home}/tunes?search=quiet.ada@example.org`);
    const session = await send('POST', `${home}/sessions`, {
      title: 'Evening',
      startsAt: '2027-01-14T19:30',
    });
    const code = String(session['code']);
    await send('GET', `/api/follow/${code}?kind=fiddle`);
    await send('GET', `/f/${code}`);
    await send('POST', '/api/auth/logout');
    // What it still has to write, it writes before it ends.
    await site.stop();

    const secrets = {
      email: EMAIL,
      other: 'nobody.at.all',
      code,
      confirm: confirm.token,
      reset: reset.token,
    };
    for (const [name, secret] of Object.entries(secrets))
      expect([name, log.includes(secret)]).toEqual([name, false]);
    for (const secret of [...PASSWORDS, ...cookies]) expect(log).not.toContain(secret);
    for (const { text } of catcher.mails) {
      const lines = text.split('\n').filter((line) => line.length > 20);
      expect(lines.filter((line) => log.includes(line))).toEqual([]);
    }
    expect(log).not.toMatch(/\$2[aby]\$|eyJ[\w-]{10}/);

    const lines = log.split('\n').flatMap((line) => (line.startsWith('{') ? [JSON.parse(line) as Line] : []));
    const logged = lines.flatMap(({ req }) => req?.id ?? []);
    expect(ids).toHaveLength(15);
    expect(ids.filter((id) => !logged.includes(id))).toEqual([]);
    expect(lines.every(({ req }) => !req?.path.includes('?'))).toBe(true);
  });
});
