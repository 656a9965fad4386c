import { startApp, type TestApp } from './app';
import { buildCircle, buildSession } from './build';

describe('figures for whoever runs the server', () => {
  let bare: TestApp;
  let withToken: TestApp;
  beforeAll(async () => {
    bare = await startApp();
    withToken = await startApp(undefined, [], { PEGWELL_METRICS_TOKEN: 'sixteen or more letters' });
  });
  afterAll(async () => {
    await bare.close();
    await withToken.close();
  });

  it('count answers by route and status, and name neither an id nor a code', async () => {
    const { circle, host } = await buildCircle(bare);
    const { id, code } = await buildSession(host, circle.id);
    await host.caller.get(`/api/sessions/${id}`).expect(200);
    await bare.caller().get(`/api/follow/${code}`).expect(200);
    await bare.caller().get(`/api/sessions/${id}`).expect(401);
    const { text, headers } = await bare.caller().get('/api/metrics').expect(200);
    // The text format: https://prometheus.io/docs/instrumenting/exposition_formats/
    expect(headers['content-type']).toMatch(/^text\/plain;.* version=0\.0\.4/);
    const count = (route: string, status: number) =>
      new RegExp(
        `^pegwell_answer_seconds_count\\{method="GET",route="${route}",status="${status}"\\} (\\d+)$`,
        'm',
      ).exec(text)?.[1];
    expect(count('/api/sessions/:id', 200)).toBe('1');
    expect(count('/api/sessions/:id', 401)).toBe('1');
    expect(count('/api/follow/:code', 200)).toBe('1');
    expect(text).toMatch(/^pegwell_database_connections\{state="open"\} [1-9]/m);
    expect(text).not.toContain(id);
    expect(text).not.toContain(code);
  });

  it('are for this machine alone, and not for what a proxy on it passes on', async () => {
    for (const header of ['X-Forwarded-For', 'Forwarded', 'Via', 'X-Real-IP']) {
      await bare.caller().get('/api/metrics').set(header, '127.0.0.1').expect(404);
    }
  });

  it('are for the token alone where there is one', async () => {
    const ask = (authorization?: string) => {
      const asked = withToken.caller().get('/api/metrics');
      return authorization === undefined ? asked : asked.set('Authorization', authorization);
    };
    await ask().expect(404);
    for (const wrong of [
      'Bearer sixteen or more letterz',
      'Bearer ',
      'Basic sixteen or more letters',
      'sixteen or more letters',
    ]) {
      await ask(wrong).expect(404);
    }
    await ask('Bearer sixteen or more letters').expect(200);
  });
});
