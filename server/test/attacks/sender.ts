import { connect } from 'node:net';
import type { Circle } from '@pegwell/shared/contract/circles';
import type { TestApp } from '../app';
import { buildCircle, type Person } from '../build';

/** A host's own requests, made by hand: with their cookie, and whatever else an attacker puts there. */
export interface Sender {
  readonly host: Person;
  readonly circle: Circle;
  /** `/api/circles/…` */
  readonly home: string;
  readonly cookie: string;
  readonly send: (
    path: string,
    init?: RequestInit & { headers?: Record<string, string> },
  ) => Promise<Response>;
  readonly sendJson: (path: string, body: string, headers?: Record<string, string>) => Promise<Response>;
  /** What goes over the wire as it stands, which no client library would send. */
  readonly raw: (text: string) => Promise<string>;
}

export async function buildSender(test: TestApp): Promise<Sender> {
  const { circle, host } = await buildCircle(test);
  const login = await host.caller
    .post('/api/auth/login')
    .send({ email: host.email, password: 'seven crooked tunes' })
    .expect(200);
  const cookie = login.headers['set-cookie']?.[0]?.split(';')[0] ?? '';
  const send: Sender['send'] = (path, init = {}) =>
    fetch(`${test.url}${path}`, { redirect: 'manual', ...init, headers: { cookie, ...init.headers } });
  return {
    ...{ host, circle, home: `/api/circles/${circle.id}`, cookie, send },
    sendJson: (path, body, headers = {}) =>
      send(path, { method: 'POST', body, headers: { 'content-type': 'application/json', ...headers } }),
    raw: (text) => raw(test.url, text),
  };
}

function raw(url: string, text: string): Promise<string> {
  const { hostname, port } = new URL(url);
  return new Promise((resolve, reject) => {
    const socket = connect(Number(port), hostname, () => socket.write(text));
    let answer = '';
    socket.setTimeout(5_000, () => socket.destroy(new Error('the server neither answers nor hangs up')));
    socket.on('data', (chunk) => (answer += chunk.toString()));
    socket.on('close', () => resolve(answer));
    socket.on('error', reject);
  });
}
