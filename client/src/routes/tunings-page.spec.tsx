import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, refusal } from './test-circle';

const get = api('GET', '/usual-tunings');
const put = api('PUT', '/usual-tunings');
const row = (key: string | null, family: 'major' | 'minor' | null, tuning: string, own = false) => ({
  ...{ kind: 'banjo', key, family, tuning, own },
});
/** As the server shows them: the built-in table (score.md) with a row of the circle's own. */
const usual = {
  items: [
    row(null, null, 'any'),
    row('G', 'major', 'gDGBD'),
    row('A', 'minor', 'gDGCD capo 2'),
    row('E', 'minor', 'gDGBD capo 4', true),
  ],
};

describe('the tunings', () => {
  it('shows each named tuning as the turns from standard', async () => {
    mockApi(circleAnswers('player'));
    renderApp(at('tunings'));
    const calico = (await screen.findByText('calico, open A')).closest('li')!;
    // facts.md: AEAC# is +2 +2 0 -3 from GDAE; what comes down is turned first.
    expect(
      within(calico).getByText(
        'E peg down 1½ steps, to C#; G peg up a whole step, to A; D peg up a whole step, to E',
      ),
    ).toBeTruthy();
    expect(within(calico).getByText('for A')).toBeTruthy();
  });

  it('shows them from where the strings stand', async () => {
    mockApi(circleAnswers('player'));
    renderApp(at('tunings'));
    await userEvent.selectOptions(await screen.findByLabelText('Your strings stand in'), 'AEAE');
    const calico = screen.getByText('calico, open A').closest('li')!;
    // facts.md, retune check: AEAE to AEAC# is one string, three semitones.
    expect(within(calico).getByText('E peg down 1½ steps, to C#')).toBeTruthy();
  });

  // Fiddle and banjo pairs, strings turned: double C to sawmill 1, open G to double C 2 (banjo); the others by hand
  // from the same pitches, waxandwane.org and Wikipedia, "Cross tuning".
  it.each([
    ['fiddle', 'GDAE', 'DDAD', 2],
    ['fiddle', 'AEAE', 'DDAD', 3],
    ['fiddle', 'AEAE', 'GDGD', 4],
    ['fiddle', 'AEAC#', 'AEAD', 1],
    ['banjo', 'gDGBD', 'gCGCD', 2],
    ['banjo', 'gDGBD', 'aDF#AD', 3],
    ['banjo', 'gCGCD', 'aDF#AD', 4],
  ])('count the pegs on a %s from %s to %s, and lead there', async (kind, from, to, pegs) => {
    mockApi(circleAnswers('player'));
    renderApp(at(`tunings?kind=${kind}`));
    const table = within(await screen.findByRole('table'));
    const texts = (cells: readonly Element[]) => cells.map((cell) => cell.textContent.replace(/\s/g, ''));
    const column = texts(table.getAllByRole('columnheader')).indexOf(to);
    const head = table.getAllByRole('rowheader').find((each) => texts([each])[0] === from)!;
    const row = head.closest('tr')!;
    const cell = within(row).getAllByRole('cell')[column]!;
    expect(cell.textContent).toBe(`${pegs}`);
    const address = within(cell).getByRole('link').getAttribute('href');
    const inFull = (text: string) => {
      const parsed = parseTuning(builtInKind(kind)!, text);
      return parsed.ok ? parsed.value.pitches.join(' ') : parsed.reason;
    };
    const query = new URLSearchParams({ kind, from: inFull(from), to: inFull(to) });
    expect(address).toBe(`/retune?${query.toString()}`);
  });

  it('lead to the tunes of the circle that are played in them', async () => {
    mockApi(circleAnswers('player'));
    renderApp(at('tunings'));
    const calico = (await screen.findByText('calico, open A')).closest('li')!;
    const address = within(calico).getByRole('link', { name: 'Tunes in it' }).getAttribute('href');
    expect(address).toMatch(/\/tunes\?kind=fiddle&tuning=AEAC%23$/);
  });

  it('has the words of safety, and defers to the string maker and a luthier', async () => {
    mockApi(circleAnswers('player'));
    renderApp(at('tunings?kind=banjo'));
    expect(await screen.findByRole('heading', { name: 'Before you turn a peg' })).toBeTruthy();
    expect(screen.getByText(/string maker's advice and a luthier come first/)).toBeTruthy();
    expect(screen.getByText(/g peg \(5th\): a whole step above .* The string can break/)).toBeTruthy();
  });
});

describe('the usual tunings', () => {
  it('are read by a player, with the circle’s own marked', async () => {
    mockApi({ ...circleAnswers('player'), [get]: ok(usual) });
    renderApp(at('tunings?kind=banjo'));
    const own = (await screen.findByText('in E minor, dorian, modal')).closest('li')!;
    expect(within(own).getByText('your circle’s own')).toBeTruthy();
    const builtIn = screen.getByText('in G major, mixolydian').closest('li')!;
    expect(within(builtIn).queryByText('your circle’s own')).toBeNull();
    expect(screen.queryByRole('button', { name: 'Change these' })).toBeNull();
  });

  it('are changed by a cohost; only what differs from the built-in table is stored', async () => {
    let sent: unknown;
    mockApi({
      ...circleAnswers('cohost'),
      [get]: ok(usual),
      [put]: (body: unknown) => {
        sent = body;
        return { status: 200, body: usual };
      },
    });
    renderApp(at('tunings?kind=banjo'));
    await userEvent.click(await screen.findByRole('button', { name: 'Change these' }));
    const field = screen.getByLabelText('G major, mixolydian');
    await userEvent.clear(field);
    await userEvent.type(field, 'gCGCD');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText(/^Saved\./)).toBeTruthy();
    expect(sent).toEqual({
      items: [
        { kind: 'banjo', key: 'E', family: 'minor', tuning: 'gDGBD capo 4' },
        { kind: 'banjo', key: 'G', family: 'major', tuning: 'gCGCD' },
      ],
    });
  });

  it('name what cannot be read at its row, and send nothing', async () => {
    const asked = mockApi({ ...circleAnswers('host'), [get]: ok(usual) });
    renderApp(at('tunings?kind=banjo'));
    await userEvent.click(await screen.findByRole('button', { name: 'Change these' }));
    const field = screen.getByLabelText('G major, mixolydian');
    await userEvent.clear(field);
    await userEvent.type(field, 'gDG');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('A banjo has 5 strings; gDG names 3: G D G.')).toBeTruthy();
    expect(asked).not.toContain(put);
  });

  it('put what the server refuses at the row it was typed into', async () => {
    mockApi({
      ...circleAnswers('host'),
      [get]: ok(usual),
      // The second row that is stored: G major.
      [put]: () => refusal(422, 'cannot-be', { 'items.1.tuning': 'Not on this banjo.' }),
    });
    renderApp(at('tunings?kind=banjo'));
    await userEvent.click(await screen.findByRole('button', { name: 'Change these' }));
    const field = screen.getByLabelText('G major, mixolydian');
    await userEvent.clear(field);
    await userEvent.type(field, 'gCGCD');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('Not on this banjo.')).toBeTruthy();
    expect(field.getAttribute('aria-invalid')).toBe('true');
  });
});
