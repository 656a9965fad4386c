import { randomUUID } from 'node:crypto';
import type { Circle, Role } from '@pegwell/shared/contract/circles';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import type { Caller, TestApp } from './app';

const PASSWORD = 'seven crooked tunes';

export interface Person {
  readonly caller: Caller;
  readonly email: string;
  readonly id: string;
}

/** A registered account, signed in. */
export async function buildAccount(test: TestApp, displayName = 'Somebody'): Promise<Person> {
  const caller = test.caller();
  const email = `${randomUUID()}@example.org`;
  const answer = await caller
    .post('/api/auth/register')
    .send({ email, password: PASSWORD, displayName })
    .expect(201);
  return { caller, email, id: (answer.body as { user: { id: string } }).user.id };
}

/** A circle with its host. */
export async function buildCircle(test: TestApp): Promise<{ circle: Circle; host: Person }> {
  const host = await buildAccount(test, 'Host');
  const answer = await host.caller
    .post('/api/circles')
    .send({ name: 'Ash Ford Circle', timeZone: 'Europe/Berlin' })
    .expect(201);
  return { circle: answer.body as Circle, host };
}

/** One more member of the circle. */
export async function buildMember(test: TestApp, circle: Circle, host: Person, role: Role): Promise<Person> {
  const person = await buildAccount(test, role);
  await host.caller.post(`/api/circles/${circle.id}/members`).send({ email: person.email, role }).expect(201);
  return person;
}

export async function buildTune(
  host: Person,
  circleId: string,
  fields: Record<string, unknown> = {},
): Promise<Tune> {
  const body = { title: 'Slack Tide', key: 'D', mode: 'major', rhythm: 'reel', tunings: [], ...fields };
  const answer = await host.caller.post(`/api/circles/${circleId}/tunes`).send(body).expect(201);
  return answer.body as Tune;
}

/** A tune with one fiddle tuning per accepted choice. */
export function buildFiddleTune(
  host: Person,
  circleId: string,
  title: string,
  ...tunings: string[]
): Promise<Tune> {
  const accepted = tunings.map((tuning) => ({ tuning }));
  return buildTune(host, circleId, { title, tunings: [{ kind: 'fiddle', accepted }] });
}

export async function buildSession(
  host: Person,
  circleId: string,
  fields: Record<string, unknown> = {},
): Promise<Session> {
  const body = { title: 'An evening', startsAt: '2027-01-14T19:30', ...fields };
  const answer = await host.caller.post(`/api/circles/${circleId}/sessions`).send(body).expect(201);
  return answer.body as Session;
}
