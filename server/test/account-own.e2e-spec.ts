import { Client } from 'pg';
import type { SignIns } from '@pegwell/shared/contract/accounts';
import { startApp, type Caller, type TestApp } from './app';
import { buildAccount, buildCircle, buildMember, buildSession, buildTune } from './build';
import { migratedDatabase, type TestDatabase } from './database';

const PASSWORD = 'seven crooked tunes';
const OTHER = 'eight straight waltzes';

describe('one’s own account', () => {
  let database: TestDatabase;
  let test: TestApp;
  let sql: Client;
  beforeAll(async () => {
    database = await migratedDatabase();
    test = await startApp(database);
    sql = new Client({ connectionString: database.url });
    await sql.connect();
  });
  afterAll(async () => {
    await sql.end();
    await test.close();
    await database.drop();
  });

  const signIn = async (email: string, password = PASSWORD, device = 'Firefox/140.0 (X11; Linux)') => {
    const caller = test.caller();
    await caller.post('/api/auth/login').set('User-Agent', device).send({ email, password }).expect(200);
    return caller;
  };
  const signInsOf = async (caller: Caller) =>
    ((await caller.get('/api/auth/sign-ins').expect(200)).body as SignIns).items;
  const isIn = async (caller: Caller) => (await caller.get('/api/auth/me')).status === 200;

  it('takes another name', async () => {
    const { caller } = await buildAccount(test, 'Ada');
    const answer = await caller.patch('/api/auth/me').send({ displayName: '  Ada Weir ' }).expect(200);
    expect(answer.body).toMatchObject({ displayName: 'Ada Weir' });
    const me = await caller.get('/api/auth/me').expect(200);
    expect(me.body).toMatchObject({ user: { displayName: 'Ada Weir' } });
    await caller.patch('/api/auth/me').send({ displayName: ' ' }).expect(400);
    // No other field of an account is to be had this way.
    await caller.patch('/api/auth/me').send({ displayName: 'Ada', confirmed: true }).expect(400);
  });

  describe('a change of password', () => {
    it('asks for the present one and ends all other sign-ins', async () => {
      const { caller, email } = await buildAccount(test);
      const elsewhere = await signIn(email);
      const wrong = await caller
        .post('/api/auth/password')
        .send({ current: 'not this one', password: OTHER })
        .expect(422);
      expect(wrong.body).toMatchObject({ code: 'wrong-password', errors: [{ path: 'current' }] });
      expect(await isIn(elsewhere)).toBe(true);
      await caller.post('/api/auth/password').send({ current: PASSWORD, password: OTHER }).expect(204);
      expect([await isIn(caller), await isIn(elsewhere)]).toEqual([true, false]);
      await test.caller().post('/api/auth/login').send({ email, password: PASSWORD }).expect(401);
      await signIn(email, OTHER);
    });

    it('refuses what anybody would try, and what anybody knows of the person', async () => {
      const { caller, email } = await buildAccount(test, 'Hildegard Unterberg');
      for (const password of ['qwertyuiop', email, 'hildegard UNTERBERG']) {
        const answer = await caller
          .post('/api/auth/password')
          .send({ current: PASSWORD, password })
          .expect(400);
        expect(answer.body).toMatchObject({ errors: [{ path: 'password' }] });
      }
    });
  });

  it('hashes a password anew at sign-in where it was hashed at another cost', async () => {
    const { email } = await buildAccount(test);
    // Of `seven crooked tunes` at cost 4, made with bcryptjs.
    const old = '$2b$04$8b8rpVbH9mpH9CrdYA5ixuF4UAdMe1H9k8szf9MVPIQWheqS0Qmyy';
    await sql.query('update accounts set password_hash = $2 where email = $1', [email, old]);
    await signIn(email);
    const { rows } = await sql.query<{ hash: string }>(
      'select password_hash as hash from accounts where email = $1',
      [email],
    );
    expect(rows[0]?.hash).toMatch(/^\$2[aby]\$1[0-9]\$/);
    await signIn(email);
  });

  it('lets nobody who sits at somebody’s open browser guess the password', async () => {
    const { caller } = await buildAccount(test);
    const guess = () => caller.post('/api/auth/me/delete').send({ current: 'not this one' });
    for (let tries = 0; tries < 10; tries++) await guess().expect(422);
    const answer = await guess().expect(429);
    expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0);
    await caller.post('/api/auth/me/delete').send({ current: PASSWORD }).expect(429);
  });

  describe('sign-ins', () => {
    it('are listed in words, this one marked, and ended one by one or all others at once', async () => {
      const { caller, email } = await buildAccount(test);
      const second = await signIn(email);
      const third = await signIn(email, PASSWORD, 'curl/8.14.1');
      const list = await signInsOf(caller);
      expect(list.map(({ device }) => device).sort()).toEqual(['A program', 'A program', 'Firefox on Linux']);
      expect(list.filter(({ here }) => here)).toHaveLength(1);
      const firefox = list.find(({ device }) => device === 'Firefox on Linux');
      await caller.delete(`/api/auth/sign-ins/${firefox?.id}`).expect(204);
      expect([await isIn(caller), await isIn(second), await isIn(third)]).toEqual([true, false, true]);
      await caller.delete(`/api/auth/sign-ins/${firefox?.id}`).expect(404);
      await caller.delete('/api/auth/sign-ins').expect(204);
      expect([await isIn(caller), await isIn(third)]).toEqual([true, false]);
      expect(await signInsOf(caller)).toHaveLength(1);
    });

    it('of others are not there', async () => {
      const one = await buildAccount(test);
      const other = await buildAccount(test);
      const [theirs] = await signInsOf(one.caller);
      await other.caller.delete(`/api/auth/sign-ins/${theirs?.id}`).expect(404);
      expect(await isIn(one.caller)).toBe(true);
    });

    it('are not listed once their cookie can have no life left', async () => {
      const { caller, email, id } = await buildAccount(test);
      await signIn(email, PASSWORD, 'long/ago');
      await sql.query(
        `update sign_ins set renewed_at = now() - interval '31 days' where account_id = $1 and user_agent = 'long/ago'`,
        [id],
      );
      expect(await signInsOf(caller)).toHaveLength(1);
    });

    it('are forgotten two months after they ended, at the next one', async () => {
      const { caller, email, id } = await buildAccount(test);
      await signIn(email, PASSWORD, 'over/1');
      await signIn(email, PASSWORD, 'unused/1');
      await sql.query(
        `update sign_ins set ended_at = now() - interval '61 days' where account_id = $1 and user_agent = 'over/1'`,
        [id],
      );
      await sql.query(
        `update sign_ins set renewed_at = now() - interval '61 days' where account_id = $1 and user_agent = 'unused/1'`,
        [id],
      );
      await signIn(email);
      const { rows } = await sql.query('select 1 from sign_ins where account_id = $1', [id]);
      expect(rows).toHaveLength(2);
      expect(await isIn(caller)).toBe(true);
    });

    it('say when they were last used, to ten minutes', async () => {
      const { caller, id } = await buildAccount(test);
      await sql.query(`update sign_ins set used_at = now() - interval '3 hours' where account_id = $1`, [id]);
      await caller.get('/api/auth/me').expect(200);
      const [own] = await signInsOf(caller);
      expect(Date.now() - Date.parse(own?.usedAt ?? '')).toBeLessThan(60_000);
    });
  });

  // shared/design/data.md: "A refresh token used again within a minute gets the same successor (a lost answer is no
  // theft); later, the family ends."
  describe('a cookie that renews itself', () => {
    const cookieOf = (answer: { headers: Record<string, unknown> }) =>
      (answer.headers['set-cookie'] as string[] | undefined)?.[0]?.split(';')[0];
    const generationOf = (cookie: string | undefined) =>
      (JSON.parse(Buffer.from(cookie?.split('.')[1] ?? '', 'base64url').toString()) as { gen: number }).gen;
    const ask = (cookie: string | undefined) =>
      test
        .caller()
        .get('/api/auth/me')
        .set('Cookie', cookie ?? '');
    const begin = async () => {
      const { email, id } = await buildAccount(test);
      const answer = await test
        .caller()
        .post('/api/auth/login')
        .send({ email, password: PASSWORD })
        .expect(200);
      const age = (interval: string) =>
        sql.query(`update sign_ins set renewed_at = renewed_at - $2::interval where account_id = $1`, [
          id,
          interval,
        ]);
      return { first: cookieOf(answer), age };
    };

    it('gets the same successor again within a minute', async () => {
      const { first, age } = await begin();
      await age('13 hours');
      const second = cookieOf(await ask(first).expect(200));
      expect(generationOf(second)).toBe(generationOf(first) + 1);
      const again = cookieOf(await ask(first).expect(200));
      expect(generationOf(again)).toBe(generationOf(second));
      await ask(second).expect(200);
    });

    it('gives ten who renew at once the same successor', async () => {
      const { first, age } = await begin();
      await age('13 hours');
      const answers = await Promise.all(Array.from({ length: 10 }, () => ask(first).expect(200)));
      expect(new Set(answers.map((answer) => generationOf(cookieOf(answer))))).toEqual(
        new Set([generationOf(first) + 1]),
      );
    });

    it('ends the family when it is used later: both copies are out', async () => {
      const { first, age } = await begin();
      await age('13 hours');
      const second = cookieOf(await ask(first).expect(200));
      await age('61 seconds');
      await ask(first).expect(401);
      await ask(second).expect(401);
    });

    it('ends the family when it is older than the last, however soon', async () => {
      const { first, age } = await begin();
      await age('13 hours');
      const second = cookieOf(await ask(first).expect(200));
      await age('13 hours');
      const third = cookieOf(await ask(second).expect(200));
      await ask(first).expect(401);
      await ask(third).expect(401);
    });
  });

  it('is handed out as a file, with nothing of anybody else and no password', async () => {
    const { circle, host } = await buildCircle(test);
    const player = await buildMember(test, circle, host, 'cohost');
    await buildTune(player, circle.id);
    const session = await buildSession(player, circle.id);
    await player.caller
      .put(`/api/sessions/${session.id}/board`)
      .send({ version: session.version, sets: [{ title: 'First set', entries: [] }] })
      .expect(200);
    const answer = await player.caller.get('/api/auth/me/data').expect(200);
    expect(answer.headers['content-disposition']).toContain('pegwell-my-data.json');
    expect(answer.body).toMatchObject({
      account: { id: player.id, email: player.email, displayName: 'cohost', confirmedAt: null },
      signIns: [{ endedAt: null }],
      circles: [{ id: circle.id, name: circle.name, role: 'cohost', leftAt: null }],
      boardsSaved: [
        { evening: session.title, version: 1 },
        { evening: session.title, version: 2 },
      ],
    });
    expect((answer.body as { done: { what: string }[] }).done.map(({ what }) => what)).toContain(
      'tune.created',
    );
    expect(answer.text).not.toMatch(/\$2[aby]\$|passwordHash/);
    expect(answer.text).not.toContain(host.email);
  });

  describe('its deletion', () => {
    const remove = (caller: Caller, current = PASSWORD) =>
      caller.post('/api/auth/me/delete').send({ current });

    it('asks for the password, ends everything and frees the address', async () => {
      const { caller, email } = await buildAccount(test);
      const elsewhere = await signIn(email);
      await remove(caller, 'not this one').expect(422);
      await remove(caller).expect(204);
      expect([await isIn(caller), await isIn(elsewhere)]).toEqual([false, false]);
      await test.caller().post('/api/auth/login').send({ email, password: PASSWORD }).expect(401);
      await test
        .caller()
        .post('/api/auth/register')
        .send({ email, password: PASSWORD, displayName: 'Anew' })
        .expect(201);
    });

    it('leaves the circle what it needs, without the name or address', async () => {
      const { circle, host } = await buildCircle(test);
      const cohost = await buildMember(test, circle, host, 'cohost');
      await cohost.caller.patch('/api/auth/me').send({ displayName: 'Wilhelmina Gonewell' }).expect(200);
      const tune = await buildTune(cohost, circle.id);
      const session = await buildSession(cohost, circle.id);
      await cohost.caller
        .put(`/api/sessions/${session.id}/board`)
        .send({ version: session.version, sets: [{ title: 'A set', entries: [{ tuneId: tune.id }] }] })
        .expect(200);
      await remove(cohost.caller).expect(204);
      const there = await host.caller.get(`/api/sessions/${session.id}`).expect(200);
      expect(there.body).toMatchObject({ sets: [{ entries: [{ tuneId: tune.id }] }] });
      await host.caller.get(`/api/circles/${circle.id}/tunes/${tune.id}`).expect(200);
      // Every table of ours, every row, as text.
      const { rows: tables } = await sql.query<{ name: string }>(
        `select format('%I.%I', table_schema, table_name) as name from information_schema.tables
         where table_schema = 'public' and table_type = 'BASE TABLE'`,
      );
      expect(tables.length).toBeGreaterThan(15);
      for (const { name } of tables) {
        const { rows } = await sql.query(`select 1 from ${name} as row where row::text ilike any($1)`, [
          [`%${cohost.email}%`, '%Gonewell%'],
        ]);
        expect([name, rows.length]).toEqual([name, 0]);
      }
    });

    it('is refused to the only host of a circle with others in it, until it is handed over', async () => {
      const { circle, host } = await buildCircle(test);
      const cohost = await buildMember(test, circle, host, 'cohost');
      const answer = await remove(host.caller).expect(422);
      expect(answer.body).toMatchObject({ code: 'sole-host' });
      expect((answer.body as { detail: string }).detail).toContain(circle.name);
      expect(await isIn(host.caller)).toBe(true);
      await host.caller
        .patch(`/api/circles/${circle.id}/members/${cohost.id}`)
        .send({ role: 'host' })
        .expect(200);
      await remove(host.caller).expect(204);
      await cohost.caller.get(`/api/circles/${circle.id}`).expect(200);
    });

    it('lets one of two hosts go who leave at once', async () => {
      const { circle, host } = await buildCircle(test);
      const second = await buildMember(test, circle, host, 'host');
      const player = await buildMember(test, circle, host, 'player');
      const answers = await Promise.all([remove(host.caller), remove(second.caller)]);
      expect(answers.map(({ status }) => status).sort()).toEqual([204, 422]);
      await player.caller.get(`/api/circles/${circle.id}`).expect(200);
    });

    it('takes a circle along in which there is nobody else', async () => {
      const { circle, host } = await buildCircle(test);
      await remove(host.caller).expect(204);
      const { rows } = await sql.query('select removed_at from circles where id = $1', [circle.id]);
      expect(rows).toEqual([{ removed_at: expect.any(Date) as Date }]);
    });
  });
});
