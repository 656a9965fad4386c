import { createSecretKey } from 'node:crypto';
import { JwtService } from '@nestjs/jwt';
import { startApp, type Caller, type TestApp } from '../app';
import { buildAccount, type Person } from '../build';

const PASSWORD = 'seven crooked tunes';
const SECRET = 'a secret of the tests, long enough to be one';

/** The claims of RFC 7519 that a token of ours carries; read, as anybody can, without the key. */
interface Claims {
  readonly sid: string;
  readonly gen: number;
}

describe('attacks on sign-ins', () => {
  let test: TestApp;
  let victim: Person;
  beforeAll(async () => {
    test = await startApp();
    victim = await buildAccount(test, 'Victim');
  });
  afterAll(() => test.close());

  const login = (email: unknown, password: unknown, caller: Caller = test.caller()) =>
    caller.post('/api/auth/login').send({ email, password });
  const me = (cookie: string) => test.caller().get('/api/auth/me').set('Cookie', cookie);
  const cookieOf = (answer: { headers: Record<string, unknown> }): string =>
    ([answer.headers['set-cookie']].flat()[0] as string).split(';')[0] ?? '';
  const freshCookie = async () => cookieOf(await login(victim.email, PASSWORD).expect(200));
  const claimsIn = (cookie: string): Claims =>
    JSON.parse(Buffer.from(cookie.split('.')[1] ?? '', 'base64url').toString()) as Claims;
  const encode = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');

  it('session fixation: a cookie planted before sign-in is not the one that is signed in', async () => {
    const attacker = await buildAccount(test, 'Attacker');
    const planted = cookieOf(await login(attacker.email, PASSWORD).expect(200));
    const answer = await test
      .caller()
      .post('/api/auth/login')
      .set('Cookie', planted)
      .send({ email: victim.email, password: PASSWORD })
      .expect(200);
    expect(cookieOf(answer)).not.toBe(planted);
    expect((await me(planted).expect(200)).body).toMatchObject({ user: { displayName: 'Attacker' } });
  });

  it('a cookie kept after signing out', async () => {
    const cookie = await freshCookie();
    await test.caller().post('/api/auth/logout').set('Cookie', cookie).expect(204);
    await me(cookie).expect(401);
  });

  // RFC 8725 (JSON Web Token best practices) sections 2.1 to 2.3 and 3.1.
  describe('a token', () => {
    let cookie: string;
    let claims: Claims;
    beforeAll(async () => {
      cookie = await freshCookie();
      claims = claimsIn(cookie);
      await me(cookie).expect(200);
    });
    const signed = (secret: string, algorithm: 'HS256' | 'HS512', expiresIn: number) =>
      `pegwell=${new JwtService().sign({ sid: claims.sid, gen: claims.gen }, { secret, algorithm, expiresIn })}`;

    it('is ours when we sign it the same way: the refusals below are for what differs', async () => {
      await me(signed(SECRET, 'HS256', 60)).expect(200);
    });

    it('unsigned (`none`, in every writing)', async () => {
      for (const alg of ['none', 'None', 'NONE', 'nOnE']) {
        await me(`pegwell=${encode({ alg, typ: 'JWT' })}.${encode({ ...claims, iat: 1 })}.`).expect(401);
      }
    });

    it('signed with another key', () =>
      me(signed('somebody else’s secret, just as long', 'HS256', 60)).expect(401));
    it('signed with an empty key', () =>
      me(
        `pegwell=${new JwtService().sign(claims, { secret: createSecretKey(Buffer.alloc(32)) as unknown as string })}`,
      ).expect(401));
    it('signed with our key by another algorithm', () => me(signed(SECRET, 'HS512', 60)).expect(401));
    it('whose time is over', () => me(signed(SECRET, 'HS256', -1)).expect(401));

    it('changed under its signature', async () => {
      const [head, , signature] = cookie.split('.');
      await me(`${head}.${encode({ ...claims, gen: claims.gen + 1 })}.${signature}`).expect(401);
    });

    it('in a header or an address instead of the cookie', async () => {
      const token = cookie.replace('pegwell=', '');
      await test.caller().get('/api/auth/me').set('Authorization', `Bearer ${token}`).expect(401);
      await test.caller().get(`/api/auth/me?token=${token}&pegwell=${token}`).expect(401);
    });
  });

  it('cookie over HTTP: on an HTTPS site it is Secure, bound to the host, and no plain one counts', async () => {
    const site = await startApp(undefined, [], { PEGWELL_URL: 'https://tunes.example.org' });
    const body = { email: 'ada@example.org', password: PASSWORD, displayName: 'Ada' };
    const answer = await site.caller().post('/api/auth/register').send(body).expect(201);
    const [set = ''] = answer.headers['set-cookie'] ?? [];
    expect(set).toMatch(/^__Host-pegwell=/);
    for (const word of ['Secure', 'HttpOnly', 'SameSite=Lax', 'Path=/']) expect(set).toContain(word);
    expect(set).not.toMatch(/Domain=/i);
    const asked = (cookie: string) => site.caller().get('/api/auth/me').set('Cookie', cookie);
    await asked(cookieOf(answer)).expect(200);
    await asked(cookieOf(answer).replace('__Host-', '')).expect(401);
    await site.close();
  });

  it('user enumeration by time: a sign-in takes as long where nobody has the address', async () => {
    const took = async (email: string) => {
      const begun = performance.now();
      await login(email, 'not this one').expect(401);
      return performance.now() - begun;
    };
    const known: number[] = [];
    const unknown: number[] = [];
    for (let round = 0; round < 9; round++) {
      known.push(await took(victim.email));
      unknown.push(await took(`nobody-${round}@example.org`));
    }
    // The quickest of each: what the machine did beside it only ever adds.
    const ratio = Math.min(...known) / Math.min(...unknown);
    expect(ratio).toBeGreaterThan(0.6);
    expect(ratio).toBeLessThan(1.67);
    await login(victim.email, PASSWORD).expect(200);
  });

  it.each([
    ['an object that matches anything', { $ne: '' }],
    ['a list of passwords', [PASSWORD, 'another']],
    ['true', true],
    ['nothing', null],
    ['a number', 0],
  ])('a password that is %s', async (_, password) => {
    await login(victim.email, password).expect(400);
  });

  it('an address that is a list or an object', async () => {
    await login([victim.email, 'attacker@example.org'], PASSWORD).expect(400);
    await login({ like: '%' }, PASSWORD).expect(400);
  });

  // bcrypt reads 72 bytes, and some writings of it stop at a NUL.
  it('a password that only begins with the right one', async () => {
    const email = 'long@example.org';
    const longest = 'crooked tune '.repeat(6).slice(0, 72);
    await test
      .caller()
      .post('/api/auth/register')
      .send({ email, password: longest, displayName: 'Long' })
      .expect(201);
    await login(email, longest).expect(200);
    await login(email, `${longest}x`).expect(401);
    await login(email, longest.slice(0, 71)).expect(401);
    await login(victim.email, `${PASSWORD}\u0000`).expect(401);
    await login(victim.email, `${PASSWORD}\u0000more`).expect(401);
  });

  it('a second account whose address looks the same (Unicode Technical Report 36)', async () => {
    await test
      .caller()
      .post('/api/auth/register')
      .send({ email: 'kay@example.org', password: PASSWORD, displayName: 'Kay' })
      .expect(201);
    // A Kelvin sign, a Cyrillic letter, a full-width letter, a dotless i, a zero-width space.
    for (const email of [
      '\u212aay@example.org',
      'k\u0430y@example.org',
      '\uff4bay@example.org',
      'kay@example.org\u0131',
      'k\u200bay@example.org',
    ]) {
      const answer = await test
        .caller()
        .post('/api/auth/register')
        .send({ email, password: PASSWORD, displayName: 'Kay' });
      expect([email, answer.status]).toEqual([email, 400]);
    }
  });

  it('brute force: sign-ins of others end by no guess at their ids', async () => {
    const { sid } = claimsIn(await freshCookie());
    const attacker = await buildAccount(test);
    await attacker.caller.delete(`/api/auth/sign-ins/${sid}`).expect(404);
  });
});
