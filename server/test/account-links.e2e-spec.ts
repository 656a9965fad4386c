import { Client } from 'pg';
import { linkIn, startMailCatcher, type CaughtMail, type MailCatcher } from '../../scripts/mail/catcher';
import { startApp, type Caller, type TestApp } from './app';
import { buildAccount } from './build';
import { migratedDatabase, type TestDatabase } from './database';

const PASSWORD = 'seven crooked tunes';
const OTHER = 'eight straight waltzes';

describe('links in mail', () => {
  let database: TestDatabase;
  let catcher: MailCatcher;
  let test: TestApp;
  let sql: Client;
  /** Mailboxes that take nothing for the time being (RFC 5321: 452). */
  const full = new Set<string>();
  beforeAll(async () => {
    database = await migratedDatabase();
    catcher = await startMailCatcher({ refuse: (address) => (full.has(address) ? 452 : undefined) });
    test = await startApp(database, [], { PEGWELL_MAIL_URL: catcher.url });
    sql = new Client({ connectionString: database.url });
    await sql.connect();
  });
  afterAll(async () => {
    await sql.end();
    await test.close();
    await catcher.close();
    await database.drop();
  });

  const mailTo = (email: string, subject: RegExp) =>
    catcher.next((mail) => mail.to.includes(email) && subject.test(mail.subject));
  const sentTo = (email: string, subject: RegExp) =>
    catcher.mails.filter((mail) => mail.to.includes(email) && subject.test(mail.subject));
  const forgot = (email: string) => test.caller().post('/api/auth/forgot').send({ email }).expect(204);
  const reset = (token: string, password = OTHER) =>
    test.caller().post('/api/auth/reset').send({ token, password });
  const login = (email: string, password: string) =>
    test.caller().post('/api/auth/login').send({ email, password });
  const confirmed = async (caller: Caller) => {
    const { body } = await caller.get('/api/auth/me').expect(200);
    return (body as { user: { email: string; confirmed: boolean } }).user;
  };
  /** The link of the nth mail that the address was sent. */
  const resetLink = async (email: string, nth = 1) => {
    await catcher.next(() => sentTo(email, /Choose/).length >= nth);
    return linkIn(newest(sentTo(email, /Choose/)));
  };
  const newest = (mails: readonly CaughtMail[]) => {
    const mail = mails.at(-1);
    if (!mail) throw new Error('no mail was sent');
    return mail;
  };
  /** What a clock that runs ahead would do. */
  const age = (email: string, hours: number) =>
    sql.query(
      `update account_links set expires_at = expires_at - $2 * interval '1 hour'
       where account_id = (select id from accounts where email = $1)`,
      [email, hours],
    );

  describe('confirming an address', () => {
    it('is asked for by a mail whose page confirms by POST, once', async () => {
      const { caller, email } = await buildAccount(test);
      expect(await confirmed(caller)).toMatchObject({ confirmed: false });
      const { url, token } = linkIn(await mailTo(email, /Confirm your/));
      // The site's own address, never the request's Host; the token where no request carries it.
      expect(url).toBe(`${test.env.PEGWELL_URL}/confirm#${token}`);
      // 32 bytes in base64url (RFC 4648, section 5).
      expect(token).toMatch(/^[\w-]{43}$/);
      // Somebody else's browser will do: the link is the proof.
      const answer = await test.caller().post('/api/auth/confirm').send({ token }).expect(200);
      expect(answer.body).toEqual({ email });
      expect(await confirmed(caller)).toMatchObject({ confirmed: true });
      await test
        .caller()
        .post('/api/auth/confirm')
        .send({ token })
        .expect(410)
        .expect(({ body }) => expect(body).toMatchObject({ code: 'link-over' }));
    });

    it('is changed by no GET', async () => {
      const { caller, email } = await buildAccount(test);
      const { token } = linkIn(await mailTo(email, /Confirm your/));
      await test.caller().get(`/api/auth/confirm?token=${token}`).expect(404);
      await test.caller().get(`/confirm?token=${token}`);
      expect(await confirmed(caller)).toMatchObject({ confirmed: false });
    });

    it('can be asked for again; the newer link makes the older one void', async () => {
      const { caller, email } = await buildAccount(test);
      const first = linkIn(await mailTo(email, /Confirm your/));
      await caller.post('/api/auth/confirm/again').expect(204);
      await catcher.next(() => sentTo(email, /Confirm your/).length === 2);
      const second = linkIn(newest(sentTo(email, /Confirm your/)));
      await test.caller().post('/api/auth/confirm').send({ token: first.token }).expect(410);
      await test.caller().post('/api/auth/confirm').send({ token: second.token }).expect(200);
    });

    it('ends after three days', async () => {
      const { email } = await buildAccount(test);
      const { token } = linkIn(await mailTo(email, /Confirm your/));
      await age(email, 72);
      await test.caller().post('/api/auth/confirm').send({ token }).expect(410);
    });

    it.each(['', 'x', 'x'.repeat(43), '__proto__', 'x'.repeat(200)])(
      'takes no %j for a link',
      async (token) => {
        const answer = await test.caller().post('/api/auth/confirm').send({ token });
        expect([400, 410]).toContain(answer.status);
      },
    );
  });

  describe('a forgotten password', () => {
    it('is replaced by the link, once; all sign-ins end and the address counts as confirmed', async () => {
      const { caller, email } = await buildAccount(test);
      await forgot(email);
      const { url, token } = await resetLink(email);
      expect(url).toBe(`${test.env.PEGWELL_URL}/reset#${token}`);
      await reset(token).expect(204);
      await caller.get('/api/auth/me').expect(401);
      await login(email, PASSWORD).expect(401);
      const again = test.caller();
      await again.post('/api/auth/login').send({ email, password: OTHER }).expect(200);
      expect(await confirmed(again)).toMatchObject({ confirmed: true });
      await reset(token, 'nine old jigs in D').expect(410);
      await mailTo(email, /password was changed/);
    });

    it('keeps the link whole when the new password is refused', async () => {
      const { email } = await buildAccount(test);
      await forgot(email);
      const { token } = await resetLink(email);
      await reset(token, 'password1234').expect(400);
      await reset(token, 'short').expect(400);
      // Known only once the link has said whose account it is.
      await reset(token, email).expect(400);
      await reset(token).expect(204);
    });

    it('has a link that lives for one hour', async () => {
      const { email } = await buildAccount(test);
      await forgot(email);
      const { token } = await resetLink(email);
      const { rows } = await sql.query<{ minutes: number }>(
        `select extract(epoch from expires_at - created_at)::float / 60 as minutes from account_links
         where purpose = 'reset' and account_id = (select id from accounts where email = $1)`,
        [email],
      );
      expect(rows[0]?.minutes).toBeCloseTo(60, 0);
      await age(email, 1);
      await reset(token).expect(410);
    });

    it('has an hour from when its mail goes out, however long that took', async () => {
      const { email } = await buildAccount(test);
      full.add(email);
      await forgot(email);
      const wasTried = async () => {
        const { rows } = await sql.query(
          `select 1 from mails where details->>'email' = $1 and tries > 0 and done_at is null`,
          [email],
        );
        return rows.length > 0;
      };
      while (!(await wasTried())) await new Promise((resolve) => setTimeout(resolve, 50));
      await age(email, 5);
      full.delete(email);
      await sql.query('update mails set due_at = now() where done_at is null');
      const { token } = await resetLink(email);
      await reset(token).expect(204);
    });

    it('makes older links void when it is asked for again', async () => {
      const { email } = await buildAccount(test);
      await forgot(email);
      const first = await resetLink(email);
      await forgot(email);
      const second = await resetLink(email, 2);
      await reset(first.token).expect(410);
      await reset(second.token).expect(204);
    });

    it('lets one of ten win who use the link at once', async () => {
      const { email } = await buildAccount(test);
      await forgot(email);
      const { token } = await resetLink(email);
      const answers = await Promise.all(
        Array.from({ length: 10 }, (_, nth) => reset(token, `tune number ${nth} of ten`)),
      );
      const winners = answers.flatMap(({ status }, nth) => (status === 204 ? [nth] : []));
      expect(answers.map(({ status }) => status).sort()).toEqual([204, ...Array<number>(9).fill(410)]);
      await login(email, `tune number ${winners[0]} of ten`).expect(200);
    });

    it('says and writes the same whether anybody has the address', async () => {
      const { email } = await buildAccount(test);
      const nobody = `nobody-${email}`;
      const unknown = await forgot(nobody);
      const known = await forgot(email);
      expect(unknown.text).toBe(known.text);
      expect(Object.keys(unknown.headers).sort()).toEqual(Object.keys(known.headers).sort());
      // Mails go out in order: when the second is there, the first was looked at.
      await resetLink(email);
      expect(sentTo(nobody, /./)).toEqual([]);
      const { rows } = await sql.query<{ letter: string }>(
        `select letter, details, tries, done_at is not null as done from mails order by created_at desc limit 2`,
      );
      expect(rows[0]?.letter).toBe('reset-password');
      expect(rows[1]).toEqual({ letter: 'reset-password', details: {}, tries: 0, done: true });
    });

    it('takes the same time whether anybody has the address', async () => {
      const { email } = await buildAccount(test);
      const time = async (address: string) => {
        const began = performance.now();
        await forgot(address);
        return performance.now() - began;
      };
      // By turns, so that whatever else the machine does falls on both.
      const known: number[] = [];
      const unknown: number[] = [];
      for (let turn = 0; turn < 4; turn++) {
        known.push(await time(email));
        unknown.push(await time(`nobody${turn}-${email}`));
      }
      // The least of four is what the work itself takes. Neither hashes a password (136 ms) nor meets the mail server.
      expect(Math.abs(Math.min(...known) - Math.min(...unknown))).toBeLessThan(25);
    });

    it('builds its link from the site’s own address, whatever the request says it is', async () => {
      const { email } = await buildAccount(test);
      await test
        .caller()
        .post('/api/auth/forgot')
        .set('Host', 'elsewhere.example')
        .set('X-Forwarded-Host', 'elsewhere.example')
        .send({ email })
        .expect(204);
      const { url } = await resetLink(email);
      expect(url.startsWith(`${test.env.PEGWELL_URL}/reset#`)).toBe(true);
    });

    it('is opened by no link for something else', async () => {
      const { caller, email } = await buildAccount(test);
      const confirm = linkIn(await mailTo(email, /Confirm your/));
      await reset(confirm.token).expect(410);
      await forgot(email);
      const { token } = await resetLink(email);
      await test.caller().post('/api/auth/confirm').send({ token }).expect(410);
      expect(await confirmed(caller)).toMatchObject({ confirmed: false });
      // And neither was used up by that.
      await test.caller().post('/api/auth/confirm').send({ token: confirm.token }).expect(200);
      await reset(token).expect(204);
    });
  });

  describe('another address', () => {
    const ask = (caller: Caller, email: string, current = PASSWORD) =>
      caller.post('/api/auth/email').send({ email, current });

    it('is the account’s once its own mail confirms it; both addresses are told', async () => {
      const { caller, email } = await buildAccount(test);
      const next = `new-${email}`;
      await ask(caller, next).expect(204);
      expect(await confirmed(caller)).toMatchObject({ email });
      await mailTo(email, /Another e-mail address was asked for/);
      const { token } = linkIn(await mailTo(next, /Confirm your new/));
      await test.caller().post('/api/auth/confirm').send({ token }).expect(200);
      expect(await confirmed(caller)).toMatchObject({ email: next, confirmed: true });
      await mailTo(email, /address was changed/);
      await login(email, PASSWORD).expect(401);
      await login(next, PASSWORD).expect(200);
    });

    it('asks for the password, at its field', async () => {
      const { caller, email } = await buildAccount(test);
      const answer = await ask(caller, `new-${email}`, 'not this one').expect(422);
      expect(answer.body).toMatchObject({ code: 'wrong-password', errors: [{ path: 'current' }] });
    });

    it('is refused when somebody has it, then and at the confirming', async () => {
      const taken = await buildAccount(test);
      const { caller, email } = await buildAccount(test);
      await ask(caller, taken.email.toUpperCase()).expect(409);
      const next = `late-${email}`;
      await ask(caller, next).expect(204);
      const { token } = linkIn(await mailTo(next, /Confirm your new/));
      await test
        .caller()
        .post('/api/auth/register')
        .send({ email: next, password: PASSWORD, displayName: 'Quicker' })
        .expect(201);
      await test.caller().post('/api/auth/confirm').send({ token }).expect(409);
      expect(await confirmed(caller)).toMatchObject({ email });
    });

    it('leaves whoever reads the old mailbox without a way in', async () => {
      const { caller, email } = await buildAccount(test);
      await forgot(email);
      const old = await resetLink(email);
      await ask(caller, `moved-${email}`).expect(204);
      const { token } = linkIn(await mailTo(`moved-${email}`, /Confirm your new/));
      await test.caller().post('/api/auth/confirm').send({ token }).expect(200);
      await reset(old.token).expect(410);
    });

    it('is called off by a reset: whoever asked for it may not have been the owner', async () => {
      const { caller, email } = await buildAccount(test);
      const next = `thief-${email}`;
      await ask(caller, next).expect(204);
      const { token } = linkIn(await mailTo(next, /Confirm your new/));
      await forgot(email);
      await reset((await resetLink(email)).token).expect(204);
      await test.caller().post('/api/auth/confirm').send({ token }).expect(410);
    });
  });

  it('keeps no token anywhere: neither in the links nor in the mail that waits', async () => {
    const { email } = await buildAccount(test);
    await forgot(email);
    const tokens = [linkIn(await mailTo(email, /Confirm your/)).token, (await resetLink(email)).token];
    const { rows } = await sql.query<{ text: string }>(
      `select l::text as text from account_links l union all select m::text from mails m`,
    );
    const stored = rows.map(({ text }) => text).join('\n');
    expect(stored.length).toBeGreaterThan(100);
    for (const token of tokens) expect(stored).not.toContain(token);
  });
});

describe('on a server that sends no mail', () => {
  it('says so, and registers nevertheless', async () => {
    const test = await startApp();
    const { caller, email } = await buildAccount(test);
    await test
      .caller()
      .get('/api/mail')
      .expect(200)
      .expect(({ body }) => expect(body).toEqual({ sends: false }));
    const noMail = (answer: { body: unknown }) => expect(answer.body).toMatchObject({ code: 'no-mail' });
    await test.caller().post('/api/auth/forgot').send({ email }).expect(422).expect(noMail);
    await caller.post('/api/auth/confirm/again').expect(422).expect(noMail);
    await caller
      .post('/api/auth/email')
      .send({ email: `new-${email}`, current: PASSWORD })
      .expect(422)
      .expect(noMail);
    await caller.post('/api/auth/password').send({ current: PASSWORD, password: OTHER }).expect(204);
    await test.close();
  });
});
