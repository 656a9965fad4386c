import { startApp, type TestApp } from './app';
import { buildAccount } from './build';

describe('accounts', () => {
  let test: TestApp;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());

  const fresh = () => ({
    email: `${Math.random()}@example.org`,
    password: 'seven crooked tunes',
    displayName: 'Ada',
  });

  it('registers, is signed in, signs out', async () => {
    const caller = test.caller();
    const values = fresh();
    const registered = await caller.post('/api/auth/register').send(values).expect(201);
    expect(registered.body).toEqual({
      user: {
        ...{ id: expect.any(String) as string, email: values.email },
        ...{ displayName: 'Ada', confirmed: false },
      },
    });
    expect(registered.headers['set-cookie']?.[0]).toMatch(/^pegwell=.*; Path=\/;.* HttpOnly; SameSite=Lax$/);
    const me = await caller.get('/api/auth/me').expect(200);
    expect(me.body).toEqual({ ...(registered.body as object), circles: [] });
    await caller.post('/api/auth/logout').expect(204);
    await caller.get('/api/auth/me').expect(401);
  });

  it('signs in with the address in any case, and refuses a wrong password with the same words as an unknown address', async () => {
    const values = fresh();
    await test.caller().post('/api/auth/register').send(values).expect(201);
    await test
      .caller()
      .post('/api/auth/login')
      .send({ ...values, email: values.email.toUpperCase(), displayName: undefined })
      .expect(200);
    const wrong = await test
      .caller()
      .post('/api/auth/login')
      .send({ email: values.email, password: 'not this one' })
      .expect(401);
    const unknown = await test
      .caller()
      .post('/api/auth/login')
      .send({ email: 'nobody@example.org', password: 'not this one' })
      .expect(401);
    expect(wrong.body).toMatchObject({ code: 'wrong-credentials' });
    expect(unknown.body).toEqual(wrong.body);
  });

  it.each([
    ['short', 'At least 10 characters.'],
    ['x'.repeat(73), /At most 72 bytes/],
    ['🎻'.repeat(19), /At most 72 bytes/],
    ['password1234', /among the first/],
    ['aaaaaaaaaaaaaaa', /among the first/],
  ])('refuses the password %j at its field', async (password, message) => {
    const answer = await test
      .caller()
      .post('/api/auth/register')
      .send({ ...fresh(), password })
      .expect(400);
    expect(answer.body).toMatchObject({ code: 'not-valid', errors: [{ path: 'password' }] });
    const [error] = (answer.body as { errors: { message: string }[] }).errors;
    expect(error?.message).toMatch(message);
  });

  it('takes a password for the same however a keyboard writes its letters', async () => {
    const values = { ...fresh(), password: 'Zaunk\u00f6nig im Schilf' };
    await test.caller().post('/api/auth/register').send(values).expect(201);
    // An o and a combining diaeresis, as some systems type it (Unicode Standard Annex 15).
    const password = 'Zaunko\u0308nig im Schilf';
    await test.caller().post('/api/auth/login').send({ email: values.email, password }).expect(200);
    const other = { email: values.email, password: 'Zaunkonig im Schilf' };
    await test.caller().post('/api/auth/login').send(other).expect(401);
  });

  it('refuses a taken e-mail, however it is written', async () => {
    const values = fresh();
    await test.caller().post('/api/auth/register').send(values).expect(201);
    const answer = await test
      .caller()
      .post('/api/auth/register')
      .send({ ...values, email: values.email.toUpperCase() })
      .expect(409);
    expect(answer.body).toMatchObject({ code: 'email-taken', errors: [{ path: 'email' }] });
  });

  it('tells every validation issue, not the first (RFC 9457 with an extension member)', async () => {
    const answer = await test
      .caller()
      .post('/api/auth/register')
      .send({ email: 'x', surprise: 1 })
      .expect(400);
    expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
    expect(answer.body).toMatchObject({
      type: expect.any(String) as string,
      title: 'Bad request',
      status: 400,
      code: 'not-valid',
    });
    const paths = (answer.body as { errors: { path: string }[] }).errors.map(({ path }) => path).sort();
    expect(paths).toEqual(['displayName', 'email', 'password', 'surprise']);
  });

  it('refuses a body that is not JSON, is no JSON type, or is too large', async () => {
    const post = () => test.caller().post('/api/auth/login');
    await post()
      .type('json')
      .send('{"email":')
      .expect(400)
      .expect(({ body }) => expect(body).toMatchObject({ code: 'not-json' }));
    await post().type('text/plain').send('email').expect(415);
    await post()
      .send({ email: 'x'.repeat(1_100_000), password: 'y' })
      .expect(413);
  });

  it('says that nobody is signed in before it judges the body', async () => {
    await test.caller().post('/api/circles').type('json').send('{"name"').expect(401);
    await test.caller().post('/api/circles').send({ nonsense: true }).expect(401);
  });

  it('refuses a changing request from another site, and from a null origin', async () => {
    const { caller } = await buildAccount(test);
    const post = (origin: string) =>
      caller.post('/api/circles').set('Origin', origin).send({ name: 'A circle' });
    await post('https://elsewhere.example').expect(403);
    await post('null').expect(403);
    await post(test.env.PEGWELL_URL).expect(201);
  });

  it('does not take a token signed with another key or with none', async () => {
    const part = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');
    const none = `${part({ alg: 'none' })}.${part({ sid: '4c1b8f5e-8a53-4f2c-9a86-0b6f4b0f3a11', gen: 1, iat: 1 })}.`;
    await test.caller().get('/api/auth/me').set('Cookie', `pegwell=${none}`).expect(401);
  });
});
