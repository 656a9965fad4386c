import { createServer, type AddressInfo, type Server, type Socket } from 'node:net';
import { Client } from 'pg';
import { startMailCatcher } from '../../scripts/mail/catcher';
import { DATABASE, type RootDatabase } from '../src/database/database';
import { MailService } from '../src/mail/mail.service';
import { MailTransport } from '../src/mail/transport';
import { startApp, type TestApp } from './app';
import { buildAccount } from './build';
import { migratedDatabase, type TestDatabase } from './database';

describe('mail', () => {
  let database: TestDatabase;
  let sql: Client;
  beforeAll(async () => {
    database = await migratedDatabase();
    sql = new Client({ connectionString: database.url });
    await sql.connect();
  });
  afterAll(async () => {
    await sql.end();
    await database.drop();
  });

  const withMail = (url: string, settings: Readonly<Record<string, string>> = {}) =>
    startApp(database, [], { PEGWELL_MAIL_URL: url, ...settings });
  /** The mail that was posted last. */
  const newest = async () => {
    const { rows } = await sql.query<{ id: string; tries: number; done: boolean; waits: number }>(
      `select id, tries, done_at is not null as done, extract(epoch from due_at - now())::float as waits
       from mails order by created_at desc limit 1`,
    );
    return rows[0];
  };
  const until = async (check: () => Promise<boolean>, patienceMs = 20_000) => {
    const deadline = Date.now() + patienceMs;
    while (!(await check())) {
      if (Date.now() > deadline) throw new Error('that did not come to be');
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  };
  const dueNow = () => sql.query('update mails set due_at = now() where done_at is null');

  it('goes out in plain text and HTML, from the site, answered by no machine', async () => {
    const catcher = await startMailCatcher();
    const test = await withMail(catcher.url, { PEGWELL_MAIL_FROM: 'tunes@pegwell.example' });
    const { email } = await buildAccount(test);
    const mail = await catcher.next(({ to }) => to.includes(email));
    expect(mail.from).toContain('tunes@pegwell.example');
    expect(mail.messageId).toBe(`<${(await newest())?.id}@localhost>`);
    expect(mail.headers.map(({ line }) => line)).toContain('Auto-Submitted: auto-generated');
    const [address] = /https?:\S+/.exec(mail.text) ?? [];
    expect(mail.html).toContain(`href="${address}"`);
    // Nothing in it is fetched from anywhere: no picture tells who read it when.
    expect(mail.html).not.toMatch(/<img|src=|url\(/i);
    await test.close();
    await catcher.close();
  });

  it('belongs to the change that causes it: undone together', async () => {
    const catcher = await startMailCatcher();
    const test = await withMail(catcher.url);
    const db = test.app.get<RootDatabase>(DATABASE);
    const undone = db.transaction(async (tx) => {
      await test.app.get(MailService).post(tx, 'password-changed', { to: 'undone@example.org' });
      throw new Error('the change failed');
    });
    await expect(undone).rejects.toThrow('the change failed');
    const { rows } = await sql.query(`select 1 from mails where details->>'to' = 'undone@example.org'`);
    expect(rows).toEqual([]);
    await test.close();
    await catcher.close();
  });

  describe('with a mail server that is away', () => {
    let silent: Server;
    const held = new Set<Socket>();
    let test: TestApp;
    beforeAll(async () => {
      // Takes the connection and says nothing: the slowest way to be away.
      silent = createServer((socket) => held.add(socket.on('error', () => undefined)));
      await new Promise<void>((resolve) => silent.listen(0, '127.0.0.1', resolve));
      test = await withMail(`smtp://127.0.0.1:${(silent.address() as AddressInfo).port}`);
    });
    afterAll(async () => {
      for (const socket of held) socket.destroy();
      await test.close();
      silent.close();
    });

    it('answers as fast as ever', async () => {
      const { caller } = await buildAccount(test);
      await until(() => Promise.resolve(held.size > 0));
      const times: number[] = [];
      for (let turn = 0; turn < 5; turn++) {
        const began = performance.now();
        await test
          .caller()
          .post('/api/auth/forgot')
          .send({ email: `turn${turn}@example.org` })
          .expect(204);
        await caller.get('/api/auth/me').expect(200);
        times.push(performance.now() - began);
      }
      // The mail server would have been waited for 10 s.
      expect(Math.min(...times)).toBeLessThan(200);
      expect(Math.max(...times)).toBeLessThan(2_000);
    });
  });

  it('is tried again, later and later, and goes out once under one Message-ID', async () => {
    let status: number | undefined = 451;
    const catcher = await startMailCatcher({ refuse: () => status });
    const test = await withMail(catcher.url);
    const { email } = await buildAccount(test);
    await until(async () => (await newest())?.tries === 1);
    const first = await newest();
    expect(first).toMatchObject({ done: false });
    expect(first?.waits).toBeGreaterThan(3);
    await dueNow();
    await until(async () => (await newest())?.tries === 2);
    expect((await newest())?.waits).toBeGreaterThan(8);
    status = undefined;
    await dueNow();
    const mail = await catcher.next(({ to }) => to.includes(email));
    expect(mail.messageId).toContain(first?.id);
    await until(async () => (await newest())?.done === true);
    // Nobody's address stays in the queue longer than it is needed.
    const { rows } = await sql.query(
      'select details from mails where done_at is not null and details <> $1',
      [{}],
    );
    expect(rows).toEqual([]);
    expect(catcher.mails.filter(({ to }) => to.includes(email))).toHaveLength(1);
    await test.close();
    await catcher.close();
  });

  it('is given up at once where the mail server says never (RFC 5321, 5yz)', async () => {
    const catcher = await startMailCatcher({ refuse: () => 550 });
    const test = await withMail(catcher.url);
    await buildAccount(test);
    await until(async () => (await newest())?.done === true);
    expect(await newest()).toMatchObject({ tries: 0 });
    expect(catcher.mails).toEqual([]);
    await test.close();
    await catcher.close();
  });

  it('goes out once from three servers that share a database', async () => {
    const catcher = await startMailCatcher();
    const servers = [await withMail(catcher.url), await withMail(catcher.url), await withMail(catcher.url)];
    const [first] = servers;
    if (!first) throw new Error('no server');
    const db = first.app.get<RootDatabase>(DATABASE);
    const addresses = Array.from({ length: 60 }, (_, nth) => `shared${nth}@example.org`);
    for (const to of addresses) await first.app.get(MailService).post(db, 'password-changed', { to });
    await until(async () => {
      const { rows } = await sql.query(
        `select 1 from mails where details->>'to' like 'shared%' and done_at is null`,
      );
      return rows.length === 0;
    });
    const caught = catcher.mails.flatMap(({ to }) => to).filter((to) => to.startsWith('shared'));
    expect(caught.sort()).toEqual([...addresses].sort());
    for (const server of servers) await server.close();
    await catcher.close();
  });

  it('cannot be given headers or recipients by what stands in it', async () => {
    const catcher = await startMailCatcher();
    const test = await withMail(catcher.url);
    // Past every schema, as if one had a hole.
    await test.app.get(MailTransport).send('8d1f6f1e-52a8-4c8a-9a5c-6f0b6a9a7d11', {
      to: 'one@example.org',
      subject: 'Hello\r\nBcc: all@example.org\r\n\r\n<script>',
      paragraphs: ['A line\r\n.\r\nMAIL FROM:<evil@example.org>', '<img src=x onerror=alert(1)>'],
    });
    const mail = await catcher.next(({ to }) => to.includes('one@example.org'));
    expect(mail.to).toEqual(['one@example.org']);
    expect(mail.headers.filter(({ name }) => name === 'bcc' || name === 'cc')).toEqual([]);
    expect(mail.subject).toBe('Hello Bcc: all@example.org <script>');
    expect(mail.text).toContain('MAIL FROM:<evil@example.org>');
    expect(mail.html).toContain('&lt;img src=x onerror=alert(1)&gt;');
    expect(catcher.mails).toHaveLength(1);
    for (const email of [
      'a@example.org\r\nBcc: b@example.org',
      'a@example.org, b@example.org',
      '<a@b.org>',
    ]) {
      await test.caller().post('/api/auth/forgot').send({ email }).expect(400);
    }
    await test.close();
    await catcher.close();
  });
});
