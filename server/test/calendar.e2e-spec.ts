import type { Session } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import ICAL from 'ical.js';
import { startApp, type Caller, type TestApp } from './app';
import { buildCircle, buildFiddleTune, buildMember, buildSession, type Person } from './build';

let test: TestApp;
let host: Person;
let circleId: string;

beforeAll(async () => {
  test = await startApp();
  const built = await buildCircle(test);
  host = built.host;
  circleId = built.circle.id;
});
afterAll(() => test.close());

async function fetchCalendar(caller: Caller, session: Session): Promise<{ text: string; name: string }> {
  const answer = await caller
    .get(`/api/sessions/${session.id}/calendar.ics`)
    .expect(200)
    .expect('Content-Type', /^text\/calendar; charset=utf-8/);
  return { text: answer.text, name: String(answer.headers['content-disposition']) };
}

/** As a program that had no part in making it reads it. */
function event(text: string) {
  const calendar = new ICAL.Component(ICAL.parse(text) as unknown[]);
  const events = calendar.getAllSubcomponents('vevent');
  expect(events).toHaveLength(1);
  return { calendar, found: events[0]!, event: new ICAL.Event(events[0]) };
}

const NOTES =
  'Bring: a cup, a chair; and "time".\nTwo\\three lines \u2013 tunes by ear, b\u011bhem ve\u010dera \ud83c\udfbb.';

describe('an evening as a calendar file', () => {
  let session: Session;
  let text: string;

  beforeAll(async () => {
    session = await buildSession(host, circleId, {
      title: 'Čtvrtek; tunes, and tea '.repeat(6).trim(),
      place: 'The net loft, Larkfen',
      notes: NOTES,
      startsAt: '2027-03-30T19:30',
      timeZone: 'Europe/Prague',
    });
    ({ text } = await fetchCalendar(host.caller, session));
  });

  it('has VERSION and PRODID once, before its one event (RFC 5545 sections 3.4, 3.6, 3.7.3 and 3.7.4)', () => {
    expect(text).toMatch(/^BEGIN:VCALENDAR\r\nVERSION:2\.0\r\nPRODID:[^\r\n]+\r\nBEGIN:VEVENT\r\n/);
    expect(text).toMatch(/\r\nEND:VEVENT\r\nEND:VCALENDAR\r\n$/);
    for (const name of ['VERSION', 'PRODID', 'UID', 'DTSTAMP', 'DTSTART', 'DTEND', 'SUMMARY', 'SEQUENCE']) {
      expect([name, text.match(new RegExp(`^${name}[:;]`, 'gm'))]).toEqual([name, [`${name}:`]]);
    }
  });

  it('ends every line in CRLF, and folds it at 75 octets (RFC 5545 section 3.1)', () => {
    expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
    const lines = text.split('\r\n').slice(0, -1);
    for (const line of lines) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
    expect(lines.some((line) => line.startsWith(' '))).toBe(true);
    // Cut between characters: every line is UTF-8 by itself.
    for (const line of lines) expect(line).not.toContain('\ufffd');
  });

  it('escapes backslashes, semicolons, commas and line ends in text (RFC 5545 section 3.3.11)', () => {
    const unfolded = text.replaceAll('\r\n ', '');
    expect(unfolded).toContain('LOCATION:The net loft\\, Larkfen\r\n');
    expect(unfolded).toContain('DESCRIPTION:Bring: a cup\\, a chair\\; and "time".\\nTwo\\\\three lines');
  });

  it('is read back as it was written by another program', () => {
    const read = event(text).event;
    expect(read.summary).toBe(session.title);
    expect(read.location).toBe('The net loft, Larkfen');
    expect(read.description).toBe(`${NOTES}\n\nFollow along: ${test.env.PEGWELL_URL}/f/${session.code}`);
    expect(read.uid).toBe(session.id);
    expect(event(text).found.getFirstPropertyValue('url')).toBe(`${test.env.PEGWELL_URL}/f/${session.code}`);
  });

  it('says its times in UTC, whatever zone the evening is in (RFC 5545 section 3.3.5)', () => {
    // Summer time began in Prague on 28 March 2027: 19:30 there is 17:30 UTC.
    expect(text).toContain('\r\nDTSTART:20270330T173000Z\r\n');
    expect(text).toMatch(/\r\nDTSTAMP:\d{8}T\d{6}Z\r\n/);
  });

  it('lasts an hour at least, and as long as what is planned', async () => {
    expect(text).toContain('\r\nDTEND:20270330T183000Z\r\n');
    const tunes: Tune[] = [];
    for (const [index, tuning] of ['ADAE', 'AEAE', 'GDAE', 'DDAD'].entries()) {
      tunes.push(await buildFiddleTune(host, circleId, `Tune ${index}`, tuning));
    }
    const ids = Array.from({ length: 16 }, (_, index) => tunes[index % 4]!.id);
    const fresh = await buildSession(host, circleId, { startsAt: '2027-01-14T19:30' });
    await host.caller
      .put(`/api/sessions/${fresh.id}/board`)
      .send({
        version: fresh.version,
        sets: [ids.slice(0, 8), ids.slice(8)].map((set) => ({ entries: set.map((tuneId) => ({ tuneId })) })),
      })
      .expect(200);
    // Sixteen tunes of 5 minutes, a break of 15, and stops of 1 minute and a half one per peg. In a set of
    // ADAE AEAE GDAE DDAD ADAE AEAE GDAE DDAD: 1 2 2 | 2 1 2 2 pegs; so 7 stops with 12 pegs make 13 minutes.
    const minutes = 16 * 5 + 15 + 2 * 13;
    const read = event((await fetchCalendar(host.caller, fresh)).text).event;
    expect(read.duration.toSeconds() / 60).toBe(Math.ceil(minutes / 5) * 5);
  });

  it('stays the same event, and counts what moves in it (RFC 5545 sections 3.8.4.7 and 3.8.7.4)', async () => {
    const fresh = await buildSession(host, circleId);
    const before = event((await fetchCalendar(host.caller, fresh)).text);
    expect(before.found.getFirstPropertyValue('sequence')).toBe(0);
    await host.caller.patch(`/api/sessions/${fresh.id}`).send({ startsAt: '2027-01-15T20:00' }).expect(200);
    const after = event((await fetchCalendar(host.caller, fresh)).text);
    expect(after.event.uid).toBe(before.event.uid);
    expect(after.found.getFirstPropertyValue('sequence')).toBe(1);
    expect(after.event.startDate.toString()).toBe('2027-01-15T19:00:00Z');
  });

  it('leaves out a place that nobody said', async () => {
    const { text: bare } = await fetchCalendar(host.caller, await buildSession(host, circleId));
    expect(bare).not.toContain('LOCATION');
  });

  it('is named after the evening (RFC 6266 section 4.3, RFC 8187 section 3.2.1)', async () => {
    const fresh = await buildSession(host, circleId, { title: 'Čtvrtek (v "loďce")' });
    const { name } = await fetchCalendar(host.caller, fresh);
    const whole = /^attachment; filename="[ -~]+\.ics"; filename\*=UTF-8''([!#$&+.^_`|~\w%-]+)$/.exec(
      name,
    )?.[1];
    expect(decodeURIComponent(whole!)).toBe('Čtvrtek (v -loďce-).ics');
  });

  it('is for members: players too, and nobody else', async () => {
    const circle = (await host.caller.get(`/api/circles/${circleId}`)).body as Parameters<
      typeof buildMember
    >[1];
    const player = await buildMember(test, circle, host, 'player');
    await fetchCalendar(player.caller, session);
    const stranger = (await buildCircle(test)).host;
    await stranger.caller.get(`/api/sessions/${session.id}/calendar.ics`).expect(404);
    await test.caller().get(`/api/sessions/${session.id}/calendar.ics`).expect(401);
  });
});
