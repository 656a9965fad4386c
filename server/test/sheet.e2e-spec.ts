import type { ScoreAnswer } from '@pegwell/shared/contract/ordering';
import type { Session } from '@pegwell/shared/contract/sessions';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { turnWords } from '@pegwell/shared/music/words';
import { DemoService } from '../src/demo/demo.service';
import { DEMO_HOST, DEMO_PASSWORD } from '../src/demo/people';
import { startApp, type Caller, type TestApp } from './app';
import { buildCircle, buildFiddleTune, buildMember, buildSession, buildTune, type Person } from './build';
import { readPdf, scanCode, type ReadPdf } from './pdf';

/** ISO 216: A4 is 210 x 297 mm. ANSI A: Letter is 8.5 x 11 in. A point is 1/72 in. */
const A4 = { width: (210 / 25.4) * 72, height: (297 / 25.4) * 72 };
const LETTER = { width: 8.5 * 72, height: 11 * 72 };

// Every sheet is drawn anew, and read by four programs.
jest.setTimeout(120_000);

let test: TestApp;
beforeAll(async () => {
  test = await startApp();
  await test.app.get(DemoService).seed();
});
afterAll(() => test.close());

async function fetchSheet(caller: Caller, sessionId: string, query = ''): Promise<Buffer> {
  const answer = await caller
    .get(`/api/sessions/${sessionId}/sheet.pdf${query}`)
    .buffer(true)
    .parse((response, done) => {
      const chunks: Buffer[] = [];
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('end', () => done(null, Buffer.concat(chunks)));
    })
    .expect(200)
    .expect('Content-Type', 'application/pdf');
  return answer.body as Buffer;
}

const sheetOf = async (caller: Caller, sessionId: string, query = '') =>
  readPdf(await fetchSheet(caller, sessionId, query));

/** The board, set by set: tune ids or whole entries. */
async function plan(
  host: Person,
  session: Session,
  sets: readonly (readonly (string | Record<string, unknown>)[])[],
  more: Record<string, unknown> = {},
): Promise<Session> {
  const answer = await host.caller
    .put(`/api/sessions/${session.id}/board`)
    .send({
      version: session.version,
      sets: sets.map((entries) => ({
        entries: entries.map((entry) => (typeof entry === 'string' ? { tuneId: entry } : entry)),
      })),
      ...more,
    })
    .expect(200);
  return answer.body as Session;
}

describe('the sheet of the demo evening', () => {
  let host: Caller;
  let session: Session;
  let sheet: ReadPdf;

  beforeAll(async () => {
    host = test.caller();
    await host.post('/api/auth/login').send({ email: DEMO_HOST.email, password: DEMO_PASSWORD }).expect(200);
    const me = (await host.get('/api/auth/me')).body as { circles: { id: string }[] };
    const list = (await host.get(`/api/circles/${me.circles[0]!.id}/sessions`)).body as {
      items: { id: string; status: string }[];
    };
    const { id } = list.items.find(({ status }) => status === 'planned')!;
    session = (await host.get(`/api/sessions/${id}`)).body as Session;
    sheet = await sheetOf(host, session.id);
  });

  it('has twenty-four tunes on two pages of A4, and of Letter', async () => {
    expect(session.sets.flatMap(({ entries }) => entries)).toHaveLength(24);
    expect(sheet.pages).toBe(2);
    expect(sheet.size.width).toBeCloseTo(A4.width, 1);
    expect(sheet.size.height).toBeCloseTo(A4.height, 1);
    const letter = await sheetOf(host, session.id, '?paper=letter');
    expect(letter.pages).toBe(2);
    expect(letter.size).toEqual(LETTER);
    expect(letter.texts.join(' ').replace(/\d of \d/g, '')).toContain('Last Punt Home');
  });

  it('says what, when and where, in the evening’s own zone, who is in the room and the room’s A', () => {
    const [first] = sheet.texts;
    expect(first).toContain(session.title);
    expect(first).toContain('19:30');
    const day = new Intl.DateTimeFormat('en-GB', {
      ...{ timeZone: session.timeZone, weekday: 'long', day: 'numeric', month: 'long', year: 'numeric' },
    }).format(new Date(session.startsAt));
    expect(first).toContain(day.replace(',', ''));
    expect(first).toContain('The net loft, Larkfen');
    expect(first).toContain('5 fiddles, 2 banjos');
    expect(first).toContain('A = 440 Hz');
    expect(first).toContain('Arrive tuned to Fiddle GDAE Banjo gDGBD');
    expect(sheet.title).toBe(session.title);
  });

  it('carries a code that leads to the page to follow, in squares and in letters', async () => {
    const code = await scanCode(await fetchSheet(host, session.id));
    expect(code).toBe(`${test.env.PEGWELL_URL}/f/${session.code}`);
    expect(sheet.texts[0]).toContain(session.code);
  });

  it('embeds its typeface, and no other', () => {
    expect(sheet.fonts.length).toBeGreaterThanOrEqual(3);
    for (const { name, embedded } of sheet.fonts) {
      expect(name).toMatch(/^[A-Z]{6}\+SourceSans3-/);
      expect(embedded).toBe(true);
    }
  });

  it('has every tune with its number, key and tunings, and before it every turn of every peg, as scored', async () => {
    const entries = session.sets.flatMap((set) => set.entries);
    const answer = await host
      .post('/api/score')
      .send({
        chairs: session.chairs,
        openings: session.openings,
        goal: session.goal,
        tunes: entries.map(({ id, key, mode, rhythm, tunings }) => ({
          ...{ id, key, mode, rhythm },
          tunings: tunings.map(({ kind, accepted }) => ({
            kind,
            accepted: accepted.map(({ tuning, capo }) => ({ tuning, capo })),
          })),
        })),
        sets: session.sets.map((set) => set.entries.map(({ id }) => id)),
      })
      .expect(200);
    const { places, score } = answer.body as ScoreAnswer;
    expect(score).toEqual(session.score);

    const text = sheet.texts.join(' ');
    let at = 0;
    let pegChanges = 0;
    entries.forEach((entry, index) => {
      const place = places[index]!;
      const row = new RegExp(` ${index + 1} ${escaped(entry.title!)}[^]*?${escaped(entry.key)} `).exec(
        text.slice(at),
      );
      expect([entry.title, row]).not.toEqual([entry.title, null]);
      const before = text.slice(at, at + row!.index);
      at += row!.index + row![0].length;

      const turned = place.kinds.flatMap(({ kind: id, from, to, deltas, pegChanges }) => {
        const kind = builtInKind(id)!;
        const [was, is] = [from!, to!].map((tuning) => {
          const read = parseTuning(kind, tuning);
          return read.ok ? read.value.pitches : [];
        });
        if (pegChanges > 0) expect(before).toContain(`${kind.plural} to ${to}`);
        return deltas.flatMap((delta, course) =>
          delta === 0 ? [] : [{ id, words: turnWords(kind, course, was![course]!, is![course]!).short }],
        );
      });
      for (const { words } of turned) expect(before).toContain(words);
      expect(before.match(/pegs? (?:\(\w+\) )?(?:up|down) /g) ?? []).toHaveLength(turned.length);
      const chairs = (id: string) => session.chairs.find(({ kind }) => kind === id)!.count;
      pegChanges += turned.reduce((sum, { id }) => sum + chairs(id), 0);

      // Behind the key: what each kind plays, in the order of the columns.
      const after = text.slice(at, at + 80);
      const [banjo, fiddle] = place.kinds;
      expect(after).toMatch(
        new RegExp(`${escaped(fiddle!.to!)}\\*? ${escaped(shown(banjo!.to!, banjo!.capoTo!))}`),
      );
    });
    expect(pegChanges).toBe(score.pegChanges);
  });

  it('marks tunings that are assumed, and says what the mark means', () => {
    const text = sheet.texts.join(' ');
    expect(text).toMatch(/Over the Waterfall D · reel GDAE\* gCGCD capo 2\*/);
    expect(text).toContain('* assumed');
    expect(text).not.toMatch(/Needlecase D · reel ADAE\*/);
  });

  it('defers to the string maker and a luthier on every page', () => {
    for (const text of sheet.texts) {
      expect(text).toContain('the string maker’s advice and a luthier come first');
      expect(text).toContain('keep your face out of line with the string');
    }
  });

  it('says where a string goes a long way, or higher than it likes', () => {
    // 5 semitones down to DDAD: more than 3, so in two goes (score.md, words of safety).
    expect(sheet.texts.join(' ')).toContain(
      'G peg (4th): a long way. Go there in two goes, with a rest between.',
    );
  });

  it('draws the past evening too', async () => {
    const me = (await host.get('/api/auth/me')).body as { circles: { id: string }[] };
    const list = (await host.get(`/api/circles/${me.circles[0]!.id}/sessions`)).body as {
      items: { id: string; status: string }[];
    };
    const past = await sheetOf(host, list.items.find(({ status }) => status === 'finished')!.id);
    expect(past.texts.join(' ')).toContain('14 Red-Haired Boy');
    expect(past.texts.join(' ')).not.toContain('played');
  });
});

describe('a sheet for any evening', () => {
  let host: Person;
  let circleId: string;
  beforeAll(async () => {
    const built = await buildCircle(test);
    host = built.host;
    circleId = built.circle.id;
  });

  it('has a page even where nothing is planned', async () => {
    const session = await buildSession(host, circleId, { title: 'Perhaps' });
    const sheet = await sheetOf(host.caller, session.id);
    expect(sheet.pages).toBe(1);
    expect(sheet.texts[0]).toContain('Nothing is planned yet.');
    expect(sheet.texts[0]).not.toContain('luthier');
  });

  it('says nothing of broken strings where no peg turns', async () => {
    const tune = await buildFiddleTune(host, circleId, 'Calm Sound', 'GDAE');
    const session = await plan(host, await buildSession(host, circleId), [[tune.id]]);
    const sheet = await sheetOf(host.caller, session.id);
    expect(sheet.texts[0]).toContain('1 Calm Sound');
    expect(sheet.texts[0]).not.toContain('luthier');
    expect(sheet.texts[0]).not.toContain(' peg ');
  });

  it('tells arriving, the pegs before the first tune, and those in the break', async () => {
    const high = await buildFiddleTune(host, circleId, 'High', 'ADAE');
    const cross = await buildFiddleTune(host, circleId, 'Cross', 'AEAE');
    const session = await plan(host, await buildSession(host, circleId), [[high.id], [cross.id]]);
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    expect(text).toMatch(
      /Arrive tuned to Fiddle GDAE.*First set.*Before the first tune.*G peg up a whole step, to A.*1 High.*Second set.*In the break.*D peg up a whole step, to E.*2 Cross/,
    );
  });

  it('lets a kind without an opening tune to the first tune that says to what', async () => {
    const any = await buildTune(host, circleId, {
      title: 'As You Are',
      tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'any' }] }],
    });
    const cross = await buildFiddleTune(host, circleId, 'Cross Too', 'AEAE');
    const fresh = await buildSession(host, circleId, { openings: { fiddle: null } });
    const session = await plan(host, fresh, [[any.id, cross.id]]);
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    expect(text).toContain('Arrive tuned to Fiddle AEAE (the first tune)');
    expect(text).toMatch(/1 As You Are .*\(AEAE\) 2 Cross Too .* AEAE/);
    expect(text).not.toContain(' peg ');
  });

  it('tells capo moves, doubled pegs, who sits out, and up to nine kinds', async () => {
    const tune = (title: string, tunings: Record<string, string>) =>
      buildTune(host, circleId, {
        title,
        key: 'A',
        tunings: Object.entries(tunings).map(([kind, text]) => {
          const [tuning, capo = '0'] = text.split(' capo ');
          return { kind, accepted: [{ tuning, capo: Number(capo) }] };
        }),
      });
    const one = await tune('One', { banjo: 'gDGBD capo 2', mandolin: 'GDAE', dulcimer: 'DAd' });
    const two = await tune('Two', { banjo: 'gDGBD', mandolin: 'ADAE', dulcimer: 'D3 A3 G3' });
    const fresh = await buildSession(host, circleId, {
      chairs: [
        { kind: 'banjo', count: 1 },
        { kind: 'mandolin', count: 1 },
        { kind: 'dulcimer', count: 2 },
        { kind: 'fiddle', count: 1 },
      ],
    });
    const session = await plan(host, fresh, [[one.id, { tuneId: two.id, sitOut: ['fiddle'] }]]);
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    expect(text).toContain('1 fiddle, 1 banjo, 1 mandolin, 2 dulcimers');
    expect(text).toContain('Banjo: capo on at fret 2');
    expect(text).toContain('Banjo: capo off');
    expect(text).toContain('Mandolin to ADAE G pegs up a whole step, to A; check all four');
    expect(text).toContain('Dulcimers to D3 A3 G3 D pegs (melody) down 3½ steps, to G; check all three');
    expect(text).toMatch(/2 Two Fiddle sits out Banjo gDGBD Mandolin ADAE Dulcimer D3 A3 G3/);
  });

  it('warns where a top string is raised, and names the tuning that raises less', async () => {
    const accepted = [{ tuning: 'GDAF' }, { tuning: 'GDAD' }];
    const sharp = await buildTune(host, circleId, {
      title: 'Sharp',
      tunings: [{ kind: 'fiddle', accepted }],
    });
    const session = await plan(host, await buildSession(host, circleId), [[sharp.id]]);
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    // E is a plain top string: a caution on any raise above standard (score.md, words of safety).
    expect(text).toContain(
      'E peg (1st): a half step above its standard pitch. The string can break: face out of its line, bring it up slowly, stop if it resists. GDAD raises less, and the tune accepts it.',
    );
  });

  it('shows open places with their minutes and medleys that go straight on, and what is noted', async () => {
    const first = await buildTune(host, circleId, {
      title: 'Gate',
      notes: 'Start slowly;\n  the third time quick.',
    });
    const second = await buildTune(host, circleId, { title: 'Post' });
    const ids = ['5b0b8a35-7f0c-4b52-9d4c-7a4f4cf36a01', '5b0b8a35-7f0c-4b52-9d4c-7a4f4cf36a02'];
    const fresh = await buildSession(host, circleId, { notes: 'Bring a cup.' });
    const session = await plan(
      host,
      fresh,
      [
        [
          { id: ids[0], tuneId: first.id },
          { id: ids[1], tuneId: second.id },
          {
            open: {
              ...{ key: 'A', mode: 'modal', minutes: 40 },
              tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE', capo: 0 }] }],
            },
          },
        ],
      ],
      { medleys: [ids] },
    );
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    expect(text).toContain('Bring a cup.');
    expect(text).toMatch(/1 Gate Start slowly; the third time quick\. Straight on into the next\./);
    expect(text).not.toMatch(/2 Post Straight on/);
    expect(text).toMatch(/3 Open: whoever calls A modal · 40 min AEAE/);
    expect(text).toContain('2 tunes, 1 open place, about 50 min');
  });

  it('prints what the typeface has, leaves emoji out, and shows a box for what it lacks', async () => {
    const titles = [
      'Dvořák’s Őrség Polka',
      'Kaj de\u0308r Bach',
      'Fire 🔥 on the 🏔️ Hill',
      '🎻',
      'B♭ 東 Stomp',
      'Щедрик',
    ];
    const tunes = [];
    for (const title of titles) tunes.push(await buildTune(host, circleId, { title }));
    const session = await plan(host, await buildSession(host, circleId, { title: 'Řeka 🎻 večer' }), [
      tunes.map(({ id }) => id),
    ]);
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    expect(text).toContain('Řeka večer');
    for (const shown of [
      '1 Dvořák’s Őrség Polka',
      '2 Kaj dër Bach',
      '3 Fire on the Hill',
      '4 Number 4',
      '5 Bb □ Stomp',
      '6 Щедрик',
    ]) {
      expect(text).toContain(shown);
    }
  });

  it('breaks titles that are longer than a line, with and without spaces, and keeps the code readable', async () => {
    const tunes = [];
    const titles = ['The Longest Title That Anybody Called '.repeat(5).trim(), 'Lla'.repeat(60)];
    for (const title of titles) tunes.push(await buildTune(host, circleId, { title }));
    const title = 'Second Thursday and whoever else may come along, '.repeat(4).trim().slice(0, 195);
    const session = await plan(host, await buildSession(host, circleId, { title }), [
      tunes.map(({ id }) => id),
    ]);
    const bytes = await fetchSheet(host.caller, session.id);
    const sheet = await readPdf(bytes);
    expect(sheet.pages).toBe(1);
    expect(sheet.texts[0]).toContain(titles[0]);
    expect(sheet.texts[0]!.replaceAll(' ', '')).toContain(titles[1]);
    expect(sheet.texts[0]).toContain(title);
    expect(await scanCode(bytes)).toBe(`${test.env.PEGWELL_URL}/f/${session.code}`);
  });

  it('takes sixty tunes: every one there, none cut by a page’s end, the set’s name on every page', async () => {
    const tunings = ['GDAE', 'ADAE', 'AEAE', 'GDGD', 'DDAD'];
    const tunes = [];
    for (let index = 0; index < 60; index++) {
      tunes.push(
        await buildFiddleTune(
          host,
          circleId,
          `Tune ${'abcdefghij'[index % 10]!}${index}`,
          tunings[index % 5]!,
        ),
      );
    }
    const session = await plan(host, await buildSession(host, circleId), [tunes.map(({ id }) => id)]);
    const sheet = await sheetOf(host.caller, session.id);
    const text = sheet.texts.join(' ');
    tunes.forEach(({ title }, index) => expect(text).toContain(` ${index + 1} ${title} `));
    expect(sheet.pages).toBeGreaterThan(2);
    sheet.texts.forEach((page, index) => {
      expect(page).toContain('First set');
      expect(page).toContain(`${index + 1} of ${sheet.pages}`);
      // A retune stands on the page of the tune that it is for: none is last on its page.
      expect(page.lastIndexOf(' Tune ')).toBeGreaterThan(page.lastIndexOf('check all four'));
    });
  });

  it('goes on from where a live evening is', async () => {
    const tunes = [];
    for (const [title, tuning] of [
      ['Was', 'AEAE'],
      ['Is', 'GDAE'],
      ['Will Be', 'ADAE'],
    ] as const) {
      tunes.push(await buildFiddleTune(host, circleId, title, tuning));
    }
    const session = await plan(host, await buildSession(host, circleId), [tunes.map(({ id }) => id)]);
    const step = (action: string) =>
      host.caller.post(`/api/sessions/${session.id}/live`).send({ action }).expect(200);
    await step('start');
    await step('retuned');
    await step('next');
    const [text] = (await sheetOf(host.caller, session.id)).texts;
    expect(text).toMatch(
      /1 Was D · reel played 2 Is D · reel GDAE G A D A E Fiddle to ADAE G peg up a whole step, to A; check all four 3 Will Be/,
    );
    expect(text).not.toContain('Arrive tuned to');
    expect(text).not.toContain('Before the first tune');
  });
});

describe('who gets a sheet, and as what', () => {
  let host: Person;
  let player: Person;
  let session: Session;
  beforeAll(async () => {
    const { circle, host: first } = await buildCircle(test);
    host = first;
    player = await buildMember(test, circle, host, 'player');
    session = await buildSession(host, circle.id, { title: 'Őrség & "Řeka" 🎻 50%*' });
  });

  it('names the file twice: plain, and whole in UTF-8 (RFC 6266 sections 4.3 and 5, RFC 8187 section 3.2.1)', async () => {
    const answer = await player.caller.get(`/api/sessions/${session.id}/sheet.pdf`).expect(200);
    const header = String(answer.headers['content-disposition']);
    const [, plainName, whole] =
      /^attachment; filename="([ -~]+)"; filename\*=UTF-8''([!#$&+.^_`|~\w%-]+)$/.exec(header)!;
    expect(decodeURIComponent(whole!)).toBe('Őrség & -Řeka- 🎻 50%.pdf');
    expect(plainName).toMatch(/^Orseg & -Reka- .*\.pdf$/);
    expect(plainName).not.toContain('%');
  });

  it('keeps it from strangers, and from who is not signed in', async () => {
    const stranger = (await buildCircle(test)).host;
    await stranger.caller.get(`/api/sessions/${session.id}/sheet.pdf`).expect(404);
    await test.caller().get(`/api/sessions/${session.id}/sheet.pdf`).expect(401);
    await host.caller.get('/api/sessions/nonsense/sheet.pdf').expect(404);
  });

  it('knows two papers, and says so of a third', async () => {
    const answer = await host.caller.get(`/api/sessions/${session.id}/sheet.pdf?paper=a5`).expect(400);
    expect(answer.body).toMatchObject({
      code: 'not-valid',
      errors: [{ path: 'paper', message: 'Paper is "a4" or "letter".' }],
    });
  });
});

function escaped(text: string): string {
  return text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
}

function shown(tuning: string, capo: number): string {
  return capo === 0 ? tuning : `${tuning} capo ${capo}`;
}
