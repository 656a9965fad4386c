import type { Follow, FollowTune } from '@pegwell/shared/contract/live';
import { Pool } from 'pg';
import { startApp, type TestApp } from './app';
import { buildEvening, fiddleTunes, type LiveEvening } from './live-evening';

const EXAMPLE = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'];
/** Worked example 1 of score.md: semitones per string into each tune, in the host's order. */
const DELTAS = [null, [2, 2, 0, 0], [-2, -2, 0, 0], [2, 0, 0, 0], [0, 2, 0, 0]];
const deltasOf = (tune: FollowTune | null) => tune?.retune?.deltas ?? null;
const tunings = (follow: Follow) =>
  [follow.now, follow.next, ...follow.later].flatMap((tune) => (tune ? [tune.tuning] : []));

describe('what phones see', () => {
  let test: TestApp;
  beforeAll(async () => void (test = await startApp()));
  afterAll(() => test.close());

  const example = (fields = {}) => buildEvening(test, [fiddleTunes(...EXAMPLE)], fields);

  it('is the first tune as next before the start, its retune from the opening', async () => {
    const evening = await example({ openings: { fiddle: 'AEAE' } });
    const seen = await evening.follow();
    expect(seen).toMatchObject({
      status: 'planned',
      title: 'An evening',
      kind: 'fiddle',
      kinds: ['fiddle'],
      referenceA: 440,
      total: 5,
      followUrl: `${test.env.PEGWELL_URL}/f/${evening.session.code}`,
      now: null,
      // The first tune wants a retune: no tune is played before it.
      retuneIn: 0,
    });
    expect(seen.next).toEqual({
      entryId: evening.order[0],
      title: 'Tune 1',
      open: false,
      key: 'A',
      mode: 'major',
      rhythm: 'reel',
      minutes: null,
      tuning: 'GDAE',
      capo: 0,
      pitches: ['G3', 'D4', 'A4', 'E5'],
      retune: {
        deltas: [-2, -2, 0, 0],
        pegChanges: 2,
        from: 'AEAE',
        to: 'GDAE',
        capoFrom: 0,
        capoTo: 0,
        fromPitches: ['A3', 'E4', 'A4', 'E5'],
        toPitches: ['G3', 'D4', 'A4', 'E5'],
        gentler: null,
      },
      set: 'Set 1',
      position: 1,
    });
    expect(seen.later.map(({ entryId }) => entryId)).toEqual(evening.order.slice(1));
  });

  it('is worked example 1 of score.md after every step of the host', async () => {
    const evening = await example();
    expect(await evening.follow()).toMatchObject({ now: null, retuneIn: 1 });
    await evening.step('start');
    for (const [index, entryId] of evening.order.entries()) {
      const seen = await evening.follow();
      expect(seen.now).toMatchObject({ entryId, tuning: EXAMPLE[index], position: index + 1 });
      expect(seen.now?.phase).toBe(DELTAS[index] ? 'tuning' : 'playing');
      expect(deltasOf(seen.now)).toEqual(DELTAS[index]);
      expect(deltasOf(seen.next)).toEqual(DELTAS[index + 1] ?? null);
      expect(seen.later.map(deltasOf)).toEqual(DELTAS.slice(index + 2));
      expect(tunings(seen)).toEqual(EXAMPLE.slice(index));
      // Every later tune of the example wants a retune: it comes after the current one.
      expect(seen.retuneIn).toBe(index < 4 ? 1 : null);
      if (index < 4) await evening.step('next');
    }
  });

  it('counts the tunes to be played before the next retune, the current one included', async () => {
    const evening = await buildEvening(test, [fiddleTunes('GDAE', 'GDAE', 'GDAE', 'ADAE', 'ADAE')]);
    expect((await evening.follow()).retuneIn).toBe(3);
    const counts = [];
    await evening.step('start');
    for (let tune = 0; tune < 5; tune++) {
      counts.push((await evening.follow()).retuneIn);
      if (tune < 4) await evening.step('next');
    }
    expect(counts).toEqual([3, 2, 1, null, null]);
  });

  it('keeps the move into the tune that is now, through retuned, until the next step', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.step('next');
    await evening.step('retuned');
    const seen = await evening.follow();
    expect(seen.now).toMatchObject({ phase: 'playing', retune: { from: 'GDAE', to: 'AEAE', pegChanges: 2 } });
  });

  it('turns nothing after back from tuning, and counts from the tunings that stayed', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.step('next');
    await evening.step('back');
    const seen = await evening.follow();
    expect(seen.now).toMatchObject({ title: 'Tune 1', tuning: 'GDAE', phase: 'playing', retune: null });
    expect(deltasOf(seen.next)).toEqual(DELTAS[1]);
  });

  it('goes to any entry, from the tunings in force', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.step('goto', { entryId: evening.order[3] });
    const seen = await evening.follow();
    expect(seen.now).toMatchObject({ title: 'Tune 4', retune: { deltas: [2, 0, 0, 0], from: 'GDAE' } });
    expect(seen.next).toMatchObject({ title: 'Tune 5', retune: { deltas: [0, 2, 0, 0], from: 'ADAE' } });
    expect(seen.later).toEqual([]);
  });

  it('is over after the end, and its code stops working a day later', async () => {
    const evening = await example();
    await evening.step('start');
    await evening.step('finish');
    expect(await evening.follow()).toMatchObject({
      status: 'finished',
      now: null,
      next: null,
      later: [],
      retuneIn: null,
    });
    const pool = new Pool({ connectionString: test.env.DATABASE_URL });
    const endedHoursAgo = async (hours: number) => {
      await pool.query(`update sessions set finished_at = now() - make_interval(secs => $2) where id = $1`, [
        evening.session.id,
        hours * 3600,
      ]);
      // What a step would do: the phones' version rises, and every process hears of it.
      await pool.query(`select pg_notify('pegwell_follow', $1 || ' 0')`, [evening.session.id]);
      await new Promise((resolve) => setTimeout(resolve, 100));
    };
    await endedHoursAgo(23.9);
    await test.caller().get(`/api/follow/${evening.session.code}`).expect(200);
    await endedHoursAgo(24.1);
    await test.caller().get(`/api/follow/${evening.session.code}`).expect(404);
    await pool.end();
  });

  it('stops answering to a code that the host replaced, and answers to the new one', async () => {
    const evening = await example();
    const path = `/api/sessions/${evening.session.id}/code`;
    const { body } = await evening.host.caller.post(path).expect(200);
    const { code } = body as { code: string };
    expect(code).not.toBe(evening.session.code);
    // The word goes round by NOTIFY, after the commit.
    await new Promise((resolve) => setTimeout(resolve, 100));
    await test.caller().get(`/api/follow/${evening.session.code}`).expect(404);
    await test.caller().get(`/api/follow/${code}`).expect(200);
  });

  describe('choices', () => {
    it('takes what accepts the tuning in force, and keeps it as a fact', async () => {
      // From AEAE the second tune's AEAE costs nothing; its first choice GDAE would cost two pegs twice.
      const evening = await buildEvening(test, [fiddleTunes('AEAE', 'GDAE or AEAE', 'AEAE')], {
        openings: { fiddle: 'AEAE' },
      });
      await evening.step('start');
      expect(tunings(await evening.follow())).toEqual(['AEAE', 'AEAE', 'AEAE']);
      await evening.step('next');
      expect((await evening.follow()).now).toMatchObject({ tuning: 'AEAE', retune: null });
      // The board changes behind it: what is now stays what the room has on its strings.
      const session = await evening.read();
      const [set] = session.sets;
      const entries = set!.entries.slice(0, 2).map(({ id }) => ({ id }));
      await evening.host.caller
        .put(`/api/sessions/${session.id}/board`)
        .send({ version: session.version, sets: [{ id: set!.id, title: set!.title, entries }] })
        .expect(200);
      expect((await evening.follow()).now).toMatchObject({ tuning: 'AEAE', retune: null });
    });

    it('takes with a step what phones showed as next, kinds together', async () => {
      const lines = ['AEAE or GDAE', 'GDAE', 'AEAE or ADAE'].map((fiddle, index) => ({
        title: `Tune ${index + 1}`,
        tunings: { fiddle, banjo: index === 0 ? 'gDGBD or gDGCD' : 'gDGCD' },
      }));
      const evening = await buildEvening(test, [lines], {
        chairs: [
          { kind: 'fiddle', count: 3 },
          { kind: 'banjo', count: 1 },
        ],
      });
      for (const step of ['start', 'next', 'next']) {
        const shown = await Promise.all(['fiddle', 'banjo'].map((kind) => evening.follow(kind)));
        await evening.step(step);
        for (const before of shown) {
          const { now } = await evening.follow(before.kind);
          expect([now?.entryId, now?.tuning, now?.retune]).toEqual([
            before.next?.entryId,
            before.next?.tuning,
            before.next?.retune,
          ]);
        }
      }
    });

    it('names an accepted tuning that raises less', async () => {
      const evening = await buildEvening(test, [fiddleTunes('GDAF or GDAE', 'GDAF')]);
      await evening.step('start');
      // Raised off the clock now it costs no stop; GDAE now would raise the plain E on the clock later.
      const { now } = await evening.follow();
      expect(now).toMatchObject({ tuning: 'GDAF', retune: { gentler: 'GDAE' } });
    });
  });

  describe('kinds', () => {
    it('shows a kind without chairs alone, as one chair, and does not stop the room for it', async () => {
      const evening = await buildEvening(test, [
        [
          { title: 'One', tunings: { fiddle: 'GDAE', guitar: 'EADGBE' } },
          { title: 'Two', tunings: { fiddle: 'GDAE', guitar: 'DADGAD' } },
        ],
      ]);
      await evening.step('start');
      expect(await evening.step('next')).toMatchObject({ phase: 'playing' });
      expect((await evening.follow('guitar')).now).toMatchObject({
        tuning: 'DADGAD',
        phase: 'playing',
        retune: { pegChanges: 3, deltas: [-2, 0, 0, 0, -2, -2] },
      });
    });

    it('shows what a kind has under any, when it sits out, and in the circle’s usual tunings', async () => {
      const chairs = [{ kind: 'banjo', count: 1 }];
      const evening = await buildEvening(
        test,
        [
          [
            { title: 'In G', key: 'G', tunings: { banjo: 'gDGBD' } },
            { title: 'As it stands', key: 'G', tunings: { banjo: 'any' } },
            { title: 'Sits out', key: 'D', tunings: { banjo: 'gCGCD capo 2' }, sitOut: ['banjo'] },
            // Nothing is said: in D the circle's usual tuning is gCGCD capo 2 (score.md, Tunes).
            { title: 'Usual', key: 'D', tunings: {} },
          ],
        ],
        { chairs },
      );
      await evening.step('start');
      const seen = await evening.follow('banjo');
      expect(tunings(seen)).toEqual(['gDGBD', 'gDGBD', 'gDGBD', 'gCGCD']);
      expect(seen.later[1]?.retune).toMatchObject({
        deltas: [0, -2, 0, 1, 0],
        capoFrom: 0,
        capoTo: 2,
      });
      expect(seen.retuneIn).toBe(3);
    });

    it('counts a capo that moves as a move, without a peg', async () => {
      const evening = await buildEvening(
        test,
        [
          [
            { title: 'In G', key: 'G', tunings: { banjo: 'gDGBD' } },
            { title: 'In A', key: 'A', tunings: { banjo: 'gDGBD capo 2' } },
          ],
        ],
        { chairs: [{ kind: 'banjo', count: 1 }] },
      );
      await evening.step('start');
      expect(await evening.follow('banjo')).toMatchObject({
        retuneIn: 1,
        next: { tuning: 'gDGBD', capo: 2, retune: { pegChanges: 0, capoFrom: 0, capoTo: 2 } },
      });
      expect(await evening.step('next')).toMatchObject({ phase: 'tuning' });
    });

    it('is free until a tuning is stated for it, and shows that one before', async () => {
      const evening = await buildEvening(test, [fiddleTunes('any', 'AEAE', 'GDAE')], {
        openings: { fiddle: null },
      });
      const planned = await evening.follow();
      expect(planned.next).toMatchObject({ tuning: 'AEAE', retune: null });
      // Being first stated turns nothing; GDAE after it does.
      expect(planned.retuneIn).toBe(2);
      expect(await evening.step('start')).toMatchObject({ phase: 'playing' });
      expect((await evening.follow()).now).toMatchObject({ tuning: 'AEAE', retune: null });
      expect((await evening.read()).inForce).toMatchObject({ fiddle: null });
      expect(await evening.step('next')).toMatchObject({ phase: 'playing' });
      expect((await evening.follow()).now).toMatchObject({ tuning: 'AEAE', retune: null });
      expect(await evening.step('next')).toMatchObject({ phase: 'tuning' });
      expect((await evening.follow()).now).toMatchObject({ retune: { from: 'AEAE', to: 'GDAE' } });
    });

    it('shows nothing for a kind for which nothing is ever stated', async () => {
      const evening = await buildEvening(test, [fiddleTunes('any', 'any')], { openings: { fiddle: null } });
      await evening.step('start');
      expect(await evening.follow()).toMatchObject({
        now: { tuning: null, capo: null, pitches: null, retune: null },
        retuneIn: null,
      });
    });
  });

  it('shows an open place with its minutes', async () => {
    const open = {
      key: 'A',
      mode: 'modal',
      minutes: 40,
      tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE' }] }],
    };
    const evening = await buildEvening(test, [[{ open }]]);
    expect((await evening.follow()).next).toMatchObject({
      title: null,
      open: true,
      minutes: 40,
      key: 'A',
      mode: 'modal',
      tuning: 'AEAE',
      retune: { deltas: [2, 2, 0, 0] },
    });
  });

  describe('over HTTP', () => {
    const get = (code: string, query: object = {}) => test.caller().get(`/api/follow/${code}`).query(query);

    it('answers 304 to the tag it gave, and a new answer after every change', async () => {
      const evening = await example();
      const { code } = evening.session;
      const first = await get(code).expect(200);
      const tag = first.headers['etag'] ?? '';
      expect(tag).toMatch(/^"[^"]+"$/);
      expect(first.headers['cache-control']).toBe('no-cache');
      const again = await get(code).set('If-None-Match', tag).expect(304);
      expect(again.text).toBe('');
      expect(again.headers['etag']).toBe(tag);
      await get(code).set('If-None-Match', `W/${tag}, "other"`).expect(304);
      await get(code).set('If-None-Match', '"other"').expect(200);
      // Another kind's answer is another answer.
      await get(code, { kind: 'banjo' }).set('If-None-Match', tag).expect(200);
      for (const action of ['start', 'next', 'retuned', 'back', 'finish']) {
        await evening.step(action);
        const seen = await get(code).set('If-None-Match', tag).expect(200);
        expect((seen.body as Follow).version).toBeGreaterThan((first.body as Follow).version);
      }
    });

    it('takes the code as people type it', async () => {
      const { session } = await example();
      const { code } = session;
      for (const typed of [
        code.toLowerCase(),
        ` ${code.slice(0, 4)} ${code.slice(4)} `,
        code.split('').join('-'),
      ]) {
        await get(encodeURIComponent(typed)).expect(200);
      }
    });

    it.each(['22222222', 'short', 'ABCDEFGHJ', '0OIL1000', "' or 1=1", 'é'])(
      'knows no evening with the code %j, and says so',
      async (code) => {
        const { body } = await get(encodeURIComponent(code)).expect(404);
        expect(body).toMatchObject({
          code: 'not-found',
          detail: expect.stringMatching(/^No evening has this code/),
        });
      },
    );

    it('refuses an unknown kind at its place', async () => {
      const { session } = await example();
      const { body } = await get(session.code, { kind: 'kazoo' }).expect(422);
      expect(body).toMatchObject({ code: 'cannot-be', errors: [{ path: 'kind' }] });
      await get(session.code, { surprise: 1 }).expect(400);
    });
  });

  describe('what changes beside the steps', () => {
    const afterChange = async (evening: LiveEvening, change: () => Promise<unknown>) => {
      const before = await evening.follow();
      await change();
      const after = await evening.follow();
      expect(after.version).toBeGreaterThan(before.version);
      return after;
    };

    it('takes in a board that is changed while it is live', async () => {
      const evening = await example();
      await evening.step('start');
      const session = await evening.read();
      const [set] = session.sets;
      const [first, second, third, ...rest] = set!.entries.map(({ id }) => ({ id }));
      const seen = await afterChange(evening, () =>
        evening.host.caller
          .put(`/api/sessions/${session.id}/board`)
          .send({
            version: session.version,
            sets: [{ id: set!.id, title: set!.title, entries: [first, third, second, ...rest] }],
          })
          .expect(200),
      );
      expect([seen.now, seen.next, ...seen.later].map((tune) => tune?.title)).toEqual(
        [1, 3, 2, 4, 5].map((number) => `Tune ${number}`),
      );
      expect(seen.retuneIn).toBe(2);
    });

    it('takes in a tune that is edited, but not on the strings of the one that is played', async () => {
      const evening = await example();
      await evening.step('start');
      const session = await evening.read();
      const [first, second] = session.sets[0]!.entries;
      const edit = (tuneId: string, body: object) =>
        evening.host.caller.patch(`/api/circles/${evening.circleId}/tunes/${tuneId}`).send(body).expect(200);
      const adae = [{ kind: 'fiddle', accepted: [{ tuning: 'ADAE' }] }];
      const seen = await afterChange(evening, () =>
        edit(second!.tuneId!, { title: 'Another name', tunings: adae }),
      );
      expect(seen.next).toMatchObject({
        title: 'Another name',
        tuning: 'ADAE',
        retune: { deltas: [2, 0, 0, 0] },
      });
      const played = await afterChange(evening, () => edit(first!.tuneId!, { tunings: adae }));
      expect(played.now).toMatchObject({ tuning: 'GDAE', retune: null });
      expect(played.next).toMatchObject({ retune: { deltas: [2, 0, 0, 0] } });
    });

    it('takes in who retunes and the usual tunings', async () => {
      const evening = await example();
      const seen = await afterChange(evening, () =>
        evening.host.caller
          .patch(`/api/sessions/${evening.session.id}`)
          .send({ chairs: [{ kind: 'banjo', count: 2 }] })
          .expect(200),
      );
      expect(seen.kinds).toEqual(['banjo']);
      const usual = { kind: 'banjo', key: 'A', family: 'major', tuning: 'gCGCD' };
      await afterChange(evening, () =>
        evening.host.caller
          .put(`/api/circles/${evening.circleId}/usual-tunings`)
          .send({ items: [usual] })
          .expect(200),
      );
      expect((await evening.follow('banjo')).next).toMatchObject({ tuning: 'gCGCD' });
    });
  });
});
