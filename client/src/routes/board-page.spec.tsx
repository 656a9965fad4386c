import type { HeldBack } from '@pegwell/shared/contract/explain';
import type {
  AcceptSuggestion,
  SessionSuggestion,
  SessionSuggestionRequest,
} from '@pegwell/shared/contract/ordering';
import type { PutBoard, Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Tune } from '@pegwell/shared/contract/tunes';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { BoardServer, sessionOf, shownEntry, uuid } from '../features/sessions/hooks/board-fixtures';
import { mockApi, ok, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';
import './board-page';

// The tunes of worked example 2 of score.md in the host's order: pegChanges 30, and 10 in the best.
const tunings = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'];
const titles = ['Stone Weir', 'Cluck Old Hen', 'Slack Tide', 'Frosty Lock Gate', 'June Apple'];
const entries = titles.map((title, index) => shownEntry(index + 1, title, { fiddle: tunings[index]! }));
const evening = (more: Partial<Session> = {}) => sessionOf([entries.slice(0, 3), entries.slice(3)], more);
const BEST_SECOND = [uuid(4), uuid(5)];
const BEST = [
  [uuid(1), uuid(3), uuid(4)],
  [uuid(2), uuid(5)],
];

function pitchesOf(name: string): string[] {
  const tuned = parseTuning(builtInKind('fiddle')!, name);
  if (!tuned.ok) throw new Error(tuned.reason);
  return [...tuned.value.pitches];
}

const CIRCLE = uuid(901);
const greyOwl: Tune = {
  ...{ id: uuid(70), settingId: uuid(71), title: 'Grey Owl', key: 'D', mode: 'major', rhythm: 'reel' },
  ...{ parts: null, composer: null, source: null, notes: null, assumed: [], can: [] },
  tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'AEAE', pitches: ['A3', 'E4', 'A4', 'E5'], capo: 0 }] }],
  ...{ createdAt: '2026-01-01T00:00:00Z', updatedAt: '2026-01-01T00:00:00Z' },
};

let server: BoardServer;
function site(more: Answers = {}): Answers {
  const path = `/api/sessions/${server.session.id}`;
  return {
    'GET /api/auth/me': ok({
      user: { id: uuid(1), email: 'ida@heron.example', displayName: 'Ida' },
      circles: [{ id: CIRCLE, name: 'Heron Weir', role: 'host' }],
    }),
    [`GET /api/circles/${CIRCLE}`]: ok({
      ...{
        id: CIRCLE,
        name: 'Heron Weir',
        role: 'host',
        timeZone: 'Europe/Berlin',
        referenceA: 440,
        can: [],
      },
    }),
    [`GET /api/circles/${CIRCLE}/usual-tunings`]: ok({ items: [] }),
    [`GET /api/circles/${CIRCLE}/tunes`]: ok({ items: [greyOwl], total: 1, page: 1, pageSize: 30 }),
    [`GET ${path}`]: () => ({ status: 200, body: server.session }),
    [`PUT ${path}/board`]: (body) => {
      for (const { id, open, tuneId } of (body as PutBoard).sets.flatMap((set) => set.entries)) {
        if (id && tuneId === greyOwl.id && !open)
          server.learn([{ ...shownEntry(70, 'Grey Owl', { fiddle: 'AEAE' }), id, tuneId }]);
      }
      void server.put(body as PutBoard);
      return { status: 200, body: server.session };
    },
    ...more,
  };
}

const open = (search = '') => renderApp(`/c/${CIRCLE}/evenings/${server.session.id}${search}`);
const stored = () => server.session.sets.map((set) => set.entries.map(({ title }) => title));
const figure = (words: RegExp) =>
  within(screen.getByText(words).closest('div')!).getByRole('definition').textContent;

beforeEach(() => {
  // A laptop: the finder stands beside the board.
  vi.stubGlobal('matchMedia', (query: string) => ({
    matches: query.includes('min-width'),
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
  }));
  server = new BoardServer(evening());
});

describe('the board', { timeout: 60_000 }, () => {
  it('shows what the evening costs, and what is turned before each tune', async () => {
    mockApi(site());
    open();
    await screen.findByRole('heading', { level: 1, name: 'Second Thursday' }, { timeout: 30_000 });
    expect(figure(/^peg changes/)).toBe('30');
    expect(figure(/^stops/)).toBe('3');
    expect(screen.getByText(/^peg changes/).textContent).toBe('peg changes, 5 in the break');
    const second = screen.getByRole('article', { name: /^Cluck Old Hen, place 2 of 3/ });
    expect(within(second).getByLabelText('A E A E')).toBeTruthy();
    expect(within(second.parentElement!).getByText(/G peg up a whole step, to A; D peg up/)).toBeTruthy();
    expect(within(second.parentElement!).getByText('2 pegs × 5 fiddles · about 2 min')).toBeTruthy();
  });

  it('prices a tune, adds it at its cheapest place and saves', async () => {
    mockApi(site());
    open();
    const add = await screen.findByRole(
      'button',
      { name: /^Add Grey Owl, free, after 5/ },
      { timeout: 30_000 },
    );
    await userEvent.click(add);
    expect(screen.getByRole('article', { name: /^Grey Owl, place 3 of 3/ })).toBeTruthy();
    await waitFor(() => expect(stored()[1]).toEqual(['Frosty Lock Gate', 'June Apple', 'Grey Owl']), {
      timeout: 5_000,
    });
  });

  it('lists the cheapest tunes first when asked to, priced for the board in hand', async () => {
    const tune = (number: number, title: string, fiddle: string): Tune => ({
      ...greyOwl,
      ...{ id: uuid(number), title },
      tunings: [{ kind: 'fiddle', accepted: [{ tuning: fiddle, pitches: pitchesOf(fiddle), capo: 0 }] }],
    });
    const [dear, cheap] = [tune(72, 'Bonaparte', 'DDAD'), tune(73, 'Rye Straw', 'AEAE')];
    mockApi(
      site({
        [`GET /api/circles/${CIRCLE}/tunes`]: ok({ items: [dear, cheap], total: 2, page: 1, pageSize: 30 }),
        [`GET /api/sessions/${server.session.id}/prices`]: (_, url) => {
          expect(url.searchParams.get('pageSize')).toBe('30');
          const items = [cheap, dear].map((each) => ({ tune: each, price: null }));
          return { status: 200, body: { items, total: 2, page: 1, pageSize: 30, version: 1, goal: 'pegs' } };
        },
      }),
    );
    open();
    const rows = () => screen.getAllByRole('button', { name: /^Add .* (after|before)/ });
    const names = () => rows().map((row) => row.getAttribute('aria-label'));
    await screen.findByRole('button', { name: /^Add Bonaparte, \d+ pegs/ }, { timeout: 30_000 });
    expect(names()[0]).toMatch(/^Add Bonaparte/);
    await userEvent.click(screen.getByRole('radio', { name: 'Cheapest first' }));
    await waitFor(() => expect(names()[0]).toBe('Add Rye Straw, free, after 5'));
  });

  it('takes a tune out by menu and puts it back by Ctrl-Z', async () => {
    mockApi(site());
    open();
    await userEvent.click(
      await screen.findByRole('button', { name: 'What to do with Slack Tide' }, { timeout: 30_000 }),
    );
    await userEvent.click(await screen.findByRole('menuitem', { name: 'Take out' }));
    await waitFor(() => expect(stored()[0]).toEqual(['Stone Weir', 'Cluck Old Hen']), { timeout: 5_000 });
    await userEvent.keyboard('{Control>}z{/Control}');
    await waitFor(() => expect(stored()[0]).toEqual(titles.slice(0, 3)), { timeout: 5_000 });
  });

  it('is there to read for a player', async () => {
    server = new BoardServer(evening({ can: ['sessions.read'] }));
    mockApi(site());
    open();
    await screen.findByRole('article', { name: /^Stone Weir/ }, { timeout: 30_000 });
    expect(screen.queryByRole('button', { name: /What to do with|Suggest|^Move / })).toBeNull();
    expect(screen.queryByRole('search')).toBeNull();
  });

  it('says that an evening is not there', async () => {
    mockApi({ ...site(), [`GET /api/sessions/${server.session.id}`]: () => ({ status: 404 }) });
    open();
    expect(
      await screen.findByRole('heading', { name: 'This evening cannot be shown' }, { timeout: 30_000 }),
    ).toBeTruthy();
  });
});

describe('a suggested order', { timeout: 60_000 }, () => {
  const suggestion = (more: Partial<SessionSuggestion> = {}): SessionSuggestion => ({
    ...{
      version: 1,
      before: server.session.score,
      after: { ...server.session.score, pegChanges: 10, retuneStops: 1 },
      sets: BEST,
      moved: [],
      goal: 'pegs',
    },
    ...{ optimal: false, provenLevels: 1, lowerBound: 10, millis: 3 },
    ...more,
  });
  const path = () => `/api/sessions/${server.session.id}/suggestion`;
  /** Takes any order and tells which; `goals` are those that the evening was changed to. */
  const taking = (answer: (asked: SessionSuggestionRequest) => SessionSuggestion) => {
    const seen = { accepted: [] as unknown[], goals: [] as unknown[] };
    const answers = site({
      [`POST ${path()}`]: (body) => ({ status: 200, body: answer(body as SessionSuggestionRequest) }),
      [`PATCH /api/sessions/${server.session.id}`]: (body) => {
        seen.goals.push((body as Partial<Session>).goal);
        server.session = { ...server.session, ...(body as Partial<Session>) };
        return { status: 200, body: server.session };
      },
      [`POST ${path()}/accept`]: (body) => {
        seen.accepted.push(body);
        const known = new Map(entries.map((entry) => [entry.id, entry]));
        const sets = server.session.sets.map((set, index) => ({
          ...set,
          entries: (body as AcceptSuggestion).sets[index]!.flatMap((id): ShownEntry[] => [known.get(id)!]),
        }));
        server.session = { ...server.session, version: server.session.version + 1, sets };
        return { status: 200, body: server.session };
      },
    });
    mockApi(answers);
    return seen;
  };

  it('stands beside the host’s, says what is better and why, is taken, and can be undone', async () => {
    const seen = taking(() => suggestion());
    open('?suggest');
    const take = await screen.findByRole('button', { name: 'Take this order' }, { timeout: 30_000 });
    expect(screen.getByRole('heading', { name: '30 peg changes as you have it' })).toBeTruthy();
    expect(screen.getByRole('heading', { name: '10 peg changes suggested' })).toBeTruthy();
    expect(screen.getByText('20 pegs and 2 stops fewer, about 4 min less tuning.')).toBeTruthy();
    expect(screen.getByText(/the fiddles turn pegs 2 times instead of 4\.$/)).toBeTruthy();
    expect(screen.getByText('No order of these tunes turns fewer pegs: proved.')).toBeTruthy();
    const first = screen.getByRole('region', { name: 'Set 1' });
    expect(within(first).getByText('D · was 4')).toBeTruthy();
    expect(within(first).getByText('5 fiddles: G peg up a whole step, to A.')).toBeTruthy();
    expect(within(first).getByText('A stop inside a set: the room waits about 1½ min.')).toBeTruthy();
    // One filled button; what keeps things as they are is an outline.
    expect(take.className).toMatch(/solid/);
    expect(screen.getByRole('button', { name: 'Keep mine' }).className).toMatch(/outline/);
    await userEvent.click(take);
    await screen.findByRole('article', { name: /^Cluck Old Hen, place 1 of 2 in Set 2/ }, { timeout: 5_000 });
    expect(seen).toEqual({ accepted: [{ version: 1, sets: BEST }], goals: [] });
    await userEvent.keyboard('{Control>}z{/Control}');
    await waitFor(() => expect(stored()[0]).toEqual(titles.slice(0, 3)), { timeout: 5_000 });
  });

  it('is taken for one set alone, with the goal it is the best for; undo brings both back', async () => {
    const [firstSet] = server.session.sets;
    const own = [[uuid(1), uuid(3), uuid(2)], BEST_SECOND];
    const asked: SessionSuggestionRequest[] = [];
    const seen = taking((body) => {
      asked.push(body);
      return suggestion({ goal: body.goal ?? 'pegs', sets: body.setId ? own : BEST });
    });
    open('?suggest');
    await screen.findByRole('button', { name: 'Take this order' }, { timeout: 30_000 });
    await userEvent.click(screen.getByRole('radio', { name: 'Fewest stops' }));
    await userEvent.click(await screen.findByRole('radio', { name: /^Only Set 1/ }));
    await screen.findByRole('heading', { name: /^2 stops suggested/ });
    expect(screen.getByText(/^Everything outside Set 1 stays as it is\./)).toBeTruthy();
    expect(screen.queryByRole('region', { name: 'Set 2' })).toBeNull();
    expect(asked).toContainEqual({ goal: 'stops', setId: firstSet!.id });
    await userEvent.click(screen.getByRole('button', { name: 'Take Set 1' }));
    await waitFor(() => expect(seen).toEqual({ accepted: [{ version: 1, sets: own }], goals: ['stops'] }), {
      timeout: 5_000,
    });
    // The one in the sentence that says what was done; the board's own says what it undoes.
    await userEvent.click(await screen.findByRole('button', { name: 'Undo', description: '' }));
    await waitFor(() => expect(stored()[0]).toEqual(titles.slice(0, 3)), { timeout: 5_000 });
    await waitFor(() => expect(seen.goals).toEqual(['stops', 'pegs']));
  });

  it('says what holds it back when it is asked', async () => {
    mockApi(
      site({
        [`POST ${path()}`]: () => ({ status: 200, body: suggestion() }),
        [`POST ${path()}/held-back`]: (body) => {
          expect(body).toEqual({ goal: 'pegs', sets: BEST });
          const item = { score: server.session.score, proved: true };
          const items: HeldBack['items'] = [
            {
              ...item,
              rule: 'tune',
              ids: [uuid(2)],
              alike: [uuid(5)],
              gains: true,
              words: 'Without Cluck Old Hen: 5 pegs fewer.',
            },
            {
              ...item,
              rule: 'pin',
              ids: [uuid(1)],
              alike: [],
              gains: false,
              words: 'Without the pin on Stone Weir: no better.',
            },
          ];
          return {
            status: 200,
            body: { version: 1, goal: 'pegs', score: item.score, items, untried: 0, millis: 9 },
          };
        },
      }),
    );
    open('?suggest');
    await userEvent.click(
      await screen.findByRole('button', { name: 'What holds it back?' }, { timeout: 30_000 }),
    );
    expect(await screen.findByText('Without Cluck Old Hen: 5 pegs fewer.')).toBeTruthy();
    expect(screen.getByText('The same without June Apple.')).toBeTruthy();
    expect(screen.getByText('Without the pin on Stone Weir: no better.')).toBeTruthy();
  });

  it('claims no proof where there is none', async () => {
    mockApi(
      site({
        [`POST ${path()}`]: () => ({ status: 200, body: suggestion({ provenLevels: 0, lowerBound: 5 }) }),
      }),
    );
    open('?suggest');
    expect(
      await screen.findByText(
        /^At least 5 pegs are needed; whether fewer than 10 are enough is not known/,
        {},
        { timeout: 30_000 },
      ),
    ).toBeTruthy();
    expect(screen.queryByText(/proved/)).toBeNull();
  });

  it('says which rules clash, at the cards they are about, and lets one go', async () => {
    server = new BoardServer(evening({ befores: [[uuid(3), uuid(1)]] }));
    const first = server.session.sets[0]!;
    server.session = {
      ...server.session,
      sets: [
        { ...first, entries: first.entries.map((each) => ({ ...each, pinned: each.id === uuid(3) })) },
        server.session.sets[1]!,
      ],
    };
    const detail = 'Slack Tide is pinned to place 3 but must come before Stone Weir';
    const clashes = [
      { rule: 'pin', ids: [uuid(3)] },
      { rule: 'before', ids: [uuid(3), uuid(1)] },
    ];
    mockApi(
      site({
        [`POST ${path()}`]: () =>
          server.session.befores.length > 0
            ? { status: 422, body: { status: 422, code: 'rules-clash', detail, clashes } }
            : { status: 200, body: suggestion({ version: server.session.version }) },
      }),
    );
    open('?suggest');
    expect((await screen.findByRole('alert', {}, { timeout: 30_000 })).textContent).toBe(detail);
    expect(screen.getByText('Pinned to place 3')).toBeTruthy();
    expect(screen.getAllByText('Slack Tide').length).toBe(2);
    await userEvent.click(screen.getByRole('button', { name: 'In any order: Slack Tide, Stone Weir' }));
    await screen.findByRole('button', { name: 'Take this order' }, { timeout: 5_000 });
    expect(server.session.befores).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Keep mine' }));
    expect(await screen.findByRole('article', { name: /^Stone Weir/ })).toBeTruthy();
  });
});
