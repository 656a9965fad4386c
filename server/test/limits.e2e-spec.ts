import { startApp, type TestApp } from './app';
import { buildAccount, buildCircle, buildSession } from './build';

/** Addresses of documentation (RFC 5737), forwarded by a proxy that is believed: here, the tests themselves. */
const HALL = '192.0.2.1';
const ELSEWHERE = '198.51.100.1';

interface Answer {
  readonly status: number;
  readonly body: unknown;
  readonly headers: Record<string, string>;
}

function expectTooMany(answer: Answer): void {
  expect(answer).toMatchObject({ status: 429, body: { code: 'too-many' } });
  expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0);
  expect((answer.body as { detail: string }).detail).toMatch(/Wait .+, then try again\.$/);
}

describe('limits', () => {
  let test: TestApp;
  beforeAll(async () => {
    test = await startApp(undefined, [], { PEGWELL_PROXIES: '127.0.0.1' });
  });
  afterAll(() => test.close());

  const signIn = async (email: string, password: string, from = HALL): Promise<Answer> =>
    test.caller().post('/api/auth/login').set('X-Forwarded-For', from).send({ email, password });

  describe('at sign-in', () => {
    it('stops the eleventh wrong password from one place, in any writing of the address, the right one too', async () => {
      const { email } = await buildAccount(test);
      const statuses: number[] = [];
      for (let count = 0; count < 10; count++) {
        statuses.push((await signIn(count % 2 ? email : email.toUpperCase(), 'not this one')).status);
      }
      expect(statuses).toEqual(Array(10).fill(401));
      expectTooMany(await signIn(email, 'not this one'));
      expectTooMany(await signIn(email, 'seven crooked tunes'));
      // Their owner, at home, is not locked out.
      expect((await signIn(email, 'seven crooked tunes', ELSEWHERE)).status).toBe(200);
    });

    it('lets no more through when all are sent at once', async () => {
      const { email } = await buildAccount(test);
      const answers = await Promise.all(Array.from({ length: 30 }, () => signIn(email, 'not this one')));
      expect(answers.filter(({ status }) => status === 401)).toHaveLength(10);
    });

    it('tells nobody whether the address has an account', async () => {
      const answers: Answer[] = [];
      for (let count = 0; count < 11; count++)
        answers.push(await signIn('nobody@example.org', 'not this one'));
      expect(answers.map(({ status }) => status)).toEqual([...Array<number>(10).fill(401), 429]);
    });

    it('forgets the wrong ones when the right one comes', async () => {
      const { email } = await buildAccount(test);
      for (let round = 0; round < 3; round++) {
        for (let count = 0; count < 9; count++) await signIn(email, 'not this one');
        expect((await signIn(email, 'seven crooked tunes')).status).toBe(200);
      }
    });

    it('counts no address that a caller made up, where no proxy stands in front', async () => {
      const bare = await startApp();
      const { email } = await buildAccount(bare);
      const statuses: number[] = [];
      for (let count = 0; count < 11; count++) {
        const answer = await bare
          .caller()
          .post('/api/auth/login')
          .set('X-Forwarded-For', `192.0.2.${count}`)
          .send({ email, password: 'not this one' });
        statuses.push(answer.status);
      }
      expect(statuses.at(-1)).toBe(429);
      await bare.close();
    });
  });

  describe('at codes', () => {
    it('stops who guesses, and neither the phones that follow from the same hall nor anybody elsewhere', async () => {
      const { circle, host } = await buildCircle(test);
      const { code } = await buildSession(host, circle.id);
      const follow = (typed: string, from: string, tag?: string) => {
        const asked = test.caller().get(`/api/follow/${typed}`).set('X-Forwarded-For', from);
        return tag === undefined ? asked : asked.set('If-None-Match', tag);
      };
      const tag = (await follow(code, HALL).expect(200)).headers['etag'] ?? '';
      // A thousand phones that each mistype once are still let in; the next wrong one is not.
      for (let sent = 0; sent < 1_000; sent += 50) {
        await Promise.all(Array.from({ length: 50 }, () => follow('22222222', HALL).expect(404)));
      }
      expectTooMany(await follow('22222222', HALL));
      expectTooMany(await follow(code, HALL));
      expectTooMany(await follow(code, HALL, '"00000000-1-1-fiddle"'));
      await follow(code, HALL, tag).expect(304);
      await follow(code, ELSEWHERE).expect(200);
    });

    it('never stops a thousand phones behind one address', async () => {
      const { circle, host } = await buildCircle(test);
      const { code } = await buildSession(host, circle.id);
      for (let sent = 0; sent < 3_000; sent += 100) {
        const answers = await Promise.all(
          Array.from({ length: 100 }, () =>
            fetch(`${test.url}/api/follow/${code}`, { headers: { 'X-Forwarded-For': '192.0.2.77' } }),
          ),
        );
        expect(answers.every(({ status }) => status === 200)).toBe(true);
      }
    });
  });

  describe('at work that holds a core', () => {
    const tunes = Array.from({ length: 12 }, (_, index) => ({
      ...{ id: `t${index}`, key: 'D', mode: 'major', rhythm: 'reel' },
      tunings: [{ kind: 'fiddle', accepted: [{ tuning: ['GDAE', 'AEAE', 'ADAE', 'DDAD'][index % 4] }] }],
    }));
    const body = {
      chairs: [{ kind: 'fiddle', count: 1 }],
      openings: {},
      tunes,
      sets: [tunes.map(({ id }) => id)],
    };

    it('stops who asks for many orders at once, and lets everybody else and the next one through', async () => {
      const one = await buildAccount(test);
      const other = await buildAccount(test);
      const ask = (who: typeof one) =>
        who.caller
          .post('/api/suggest')
          .send(body)
          .then((answer) => answer as Answer);
      const many = await Promise.all([...Array.from({ length: 30 }, () => ask(one)), ask(other)]);
      expect(many.at(-1)?.status).toBe(200);
      const statuses = many.slice(0, -1).map(({ status }) => status);
      expect(new Set(statuses)).toEqual(new Set([200, 429]));
      expect(statuses.filter((status) => status === 200).length).toBeGreaterThanOrEqual(8);
      const [refused] = many.filter(({ status }) => status === 429);
      if (refused) expectTooMany(refused);
      expect((await ask(one)).status).toBe(200);
    });

    it('never stops a program that waits for each answer (contract.md)', async () => {
      const one = await buildAccount(test);
      for (let count = 0; count < 100; count++) {
        await one.caller.post('/api/score').send(body).expect(200);
        await one.caller.post('/api/suggest').send(body).expect(200);
      }
    });
  });
});
