import type { Rack } from '@pegwell/shared/contract/racks';
import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { PLAN, rack, racks, turn } from '../features/racks/racks-fixtures';
import { mockApi, ok, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';
import { at, circleAnswers, refusal } from './test-circle';

const PATH = '/api/sessions/s1/racks';

function open(role: 'host' | 'player', answers: Answers) {
  const asked = mockApi({ ...circleAnswers(role), ...answers });
  renderApp(at('evenings/s1/racks'));
  return asked;
}

/** A server that keeps what is sent. */
function serving(start: readonly Rack[]) {
  const server = { items: [...start], sent: [] as unknown[] };
  const keep = (body: unknown, id: string): { status: number; body: Rack } => {
    server.sent.push(body);
    const { player, kind } = body as Rack;
    const kept = rack({ id, player, kind });
    server.items = [...server.items.filter((each) => each.id !== id), kept];
    return { status: 200, body: kept };
  };
  const answers: Answers = {
    [`GET ${PATH}`]: () => ({ status: 200, body: racks(server.items) }),
    [`POST ${PATH}`]: (body) => keep(body, `r${server.items.length + 1}`),
    [`PUT ${PATH}/r1`]: (body) => keep(body, 'r1'),
    [`DELETE ${PATH}/r1`]: () => {
      server.items = server.items.filter(({ id }) => id !== 'r1');
      return { status: 204 };
    },
  };
  return { server, answers };
}

const text = (element: Element) => element.textContent.replace(/\s+/g, ' ').trim();
const section = (name: RegExp) => screen.findByRole('region', { name });

describe('the racks page', () => {
  it('shows a player which instrument to play, what to turn when, and what it saves', async () => {
    open('player', { [`GET ${PATH}`]: ok(racks([rack()])) });
    const mara = within(await section(/^Mara two fiddles/));
    expect(mara.getAllByRole('definition').map(text)).toEqual(['2', '1']);
    expect(mara.getAllByRole('term').map(text)).toEqual([
      'pegs instead of 7',
      'stop instead of 2 with one fiddle',
    ]);

    const bring = within(mara.getByRole('region', { name: 'Before you come' }));
    expect(bring.getAllByRole('listitem').map(text)).toEqual([
      'Fiddle 1GDAEAs everybody arrives.',
      'Fiddle 2AEAETune it before you come.From standard: G peg up a whole step, to A; D peg up a whole step, to E.' +
        'G peg (4th): a whole step above its standard pitch. Bring it up slowly, from below.' +
        'D peg (3rd): a whole step above its standard pitch. Bring it up slowly, from below.',
    ]);

    const first = mara.getByRole('region', { name: 'First set' });
    const steps = [...first.querySelectorAll(':scope > ol > li')];
    expect(steps.map((step) => text(step.querySelector('h4') ?? step))).toEqual([
      'Fiddle 1GDAE1Slack Tide',
      'Fiddle 2AEAE2Stone Weir',
      'Stop before 3, Ford Lane',
      'Fiddle 1ADAE3Ford Lane4Low Bridge',
    ]);
    expect(text(steps[2]!)).toContain('1 peg, to ADAE');
    expect(within(first).getByText('G peg (4th): up a whole step, from G to A')).toBeTruthy();
    expect(within(first).getByText('This tune is also played in GDAE, which raises less.')).toBeTruthy();

    const second = within(mara.getByRole('region', { name: 'Second set' }));
    expect(text(second.getByRole('heading', { level: 4 }))).toBe('In the break off the clock');
    expect(second.getByText('A modal tunes').textContent).toContain('as it stands');
    // Who may not change it is not offered to.
    expect(screen.queryByRole('button', { name: /Add a player|Change|Take out/ })).toBeNull();
  });

  it('shows what the limits refuse only to a player who goes on', async () => {
    const steep = turn({ before: 'e3', instrument: 0, from: 'GDAE', to: 'GDAG' });
    open('player', { [`GET ${PATH}`]: ok(racks([rack({ plan: { ...PLAN, turns: [steep] } })])) });
    await section(/^Mara/);
    expect(screen.getByText(/Only the player at the peg can go on/)).toBeTruthy();
    expect(screen.queryByText(/E peg \(1st\): up/)).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: 'I know my strings. Show the turns' }));
    expect(screen.getByText('E peg (1st): up 1½ steps, from E to G')).toBeTruthy();
  });

  it('takes a player’s instruments from a host, and shows that plan', async () => {
    const { server, answers } = serving([rack({ id: 'r9', player: 'Neva' })]);
    open('host', answers);
    await userEvent.click(await screen.findByRole('button', { name: 'Add a player' }));
    const dialog = within(await screen.findByRole('dialog'));
    // Fiddles come first, as they do everywhere; the second is tuned to what the plan says.
    expect(dialog.getByLabelText<HTMLSelectElement>('Instrument').value).toBe('fiddle');
    await userEvent.click(dialog.getByRole('button', { name: 'Add and see the plan' }));
    expect(await dialog.findByText('Say whose they are.')).toBeTruthy();
    await userEvent.type(dialog.getByLabelText('Player'), 'Ilse');
    await userEvent.click(dialog.getByRole('button', { name: 'One more fiddle' }));
    await userEvent.selectOptions(dialog.getByLabelText('Fiddle 3 comes'), 'in another tuning');
    await userEvent.type(dialog.getByLabelText('Which tuning'), 'AEA');
    await userEvent.click(dialog.getByRole('button', { name: 'Add and see the plan' }));
    expect(await dialog.findByText('A fiddle has 4 strings; AEA names 3: A E A.')).toBeTruthy();
    await userEvent.type(dialog.getByLabelText('Which tuning'), 'E');
    await userEvent.click(dialog.getByRole('button', { name: 'Add and see the plan' }));
    expect(await section(/^Ilse/)).toBeTruthy();
    expect(server.sent).toEqual([
      {
        player: 'Ilse',
        kind: 'fiddle',
        instruments: [{ arrives: 'opening' }, { arrives: 'free' }, { arrives: 'tuned', tuning: 'AEAE' }],
      },
    ]);
    const players = within(screen.getByRole('navigation', { name: 'Players' }));
    expect(players.getAllByRole('link').map(text)).toEqual([
      'Nevatwo fiddles2 pegs, 1 stop',
      'Ilsetwo fiddles2 pegs, 1 stop',
    ]);
    await userEvent.click(players.getByRole('link', { name: /Neva/ }));
    expect(await section(/^Neva/)).toBeTruthy();
    expect(screen.queryByRole('region', { name: /^Ilse/ })).toBeNull();
  });

  it('offers no fifth instrument', async () => {
    open('host', serving([]).answers);
    await userEvent.click(await screen.findByRole('button', { name: 'Add a player' }));
    const dialog = within(await screen.findByRole('dialog'));
    const more = dialog.getByRole('button', { name: 'One more fiddle' });
    for (let clicks = 0; clicks < 3; clicks++) await userEvent.click(more);
    expect(dialog.getAllByRole('group', { name: /^Fiddle \d$/ })).toHaveLength(4);
    expect(more.getAttribute('aria-disabled')).toBe('true');
  });

  it('says when somebody else was first, and saves over theirs only when asked again', async () => {
    const { server, answers } = serving([rack()]);
    let stale = true;
    open('host', {
      ...answers,
      [`PUT ${PATH}/r1`]: (body, url) => {
        if (!stale) return answers[`PUT ${PATH}/r1`]!(body, url);
        stale = false;
        server.items = [rack({ version: 2 })];
        return {
          ...refusal(409, 'changed'),
          body: { status: 409, code: 'changed', detail: 'Somebody changed these instruments meanwhile.' },
        };
      },
    });
    await userEvent.click(await screen.findByRole('button', { name: /^Change/ }));
    const dialog = within(await screen.findByRole('dialog'));
    await userEvent.click(dialog.getByRole('button', { name: 'Save' }));
    expect(await dialog.findByText('Somebody changed these instruments meanwhile.')).toBeTruthy();
    await userEvent.click(dialog.getByRole('button', { name: 'Save' }));
    await screen.findByRole('button', { name: /^Change/ });
    expect(server.sent).toMatchObject([{ version: 2, player: 'Mara' }]);
  });

  it('takes a player out, with a way back', async () => {
    const { server, answers } = serving([rack()]);
    open('host', answers);
    await userEvent.click(await screen.findByRole('button', { name: 'Take out Mara' }));
    expect(
      await screen.findByRole('heading', { name: 'Nobody is down with instruments of their own' }),
    ).toBeTruthy();
    await userEvent.click(await screen.findByRole('button', { name: 'Undo' }));
    expect(await section(/^Mara/)).toBeTruthy();
    expect(server.sent).toEqual([
      { player: 'Mara', kind: 'fiddle', instruments: [{ arrives: 'opening' }, { arrives: 'free' }] },
    ]);
  });

  it('says why there is no plan, and what an empty board waits for', async () => {
    const refused = rack({
      id: 'r2',
      plan: null,
      refusal: 'This evening asks a fiddle for 15 tunings. A plan is worked out for up to 14.',
    });
    open('player', { [`GET ${PATH}`]: ok(racks([rack(), refused], [])) });
    const mara = within(await section(/^Mara/));
    expect(mara.getByText('There is no tune on the board yet. The plan comes with the first.')).toBeTruthy();
    await userEvent.click(screen.getAllByRole('link', { name: /Mara/ })[1]!);
    expect(await screen.findByText(/^This evening asks a fiddle for 15 tunings/)).toBeTruthy();
  });

  it('asks for nobody once the evening is over', async () => {
    const { evening, items } = racks([]);
    open('host', { [`GET ${PATH}`]: ok({ evening: { ...evening, status: 'finished' }, items }) });
    expect(await screen.findByText('This evening is over.')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Add a player' })).toBeNull();
  });

  it('says when it cannot be loaded, and asks again', async () => {
    let away = true;
    open('player', {
      [`GET ${PATH}`]: () => (away ? refusal(503, 'unavailable') : { status: 200, body: racks([]) }),
    });
    await screen.findByRole('heading', { name: 'This evening cannot be shown' });
    away = false;
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(
      await screen.findByText('Bringing two? Tell a host, and the plan for yours stands here.'),
    ).toBeTruthy();
  });
});
