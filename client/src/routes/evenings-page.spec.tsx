import type { SessionSummary } from '@pegwell/shared/contract/sessions';
import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, id, page, refusal, tune } from './test-circle';

const evening = (number: number, title: string, more: Partial<SessionSummary> = {}): SessionSummary => ({
  id: id(number),
  title,
  place: 'The boathouse',
  code: `ABCD234${number % 10}`,
  status: 'planned',
  startsAt: '2099-01-14T19:30:00.000Z',
  localStart: '2099-01-14T19:30',
  timeZone: 'Europe/London',
  tunes: 16,
  sets: 2,
  ...more,
});
const list = api('GET', '/sessions');
const three = [
  evening(21, 'Far off', { startsAt: '2099-05-01T19:00:00.000Z' }),
  evening(22, 'Next'),
  evening(23, 'Long ago', { startsAt: '2020-01-09T19:30:00.000Z', status: 'finished' }),
];

describe('the evenings', () => {
  it('stand in time: the next one first, then what was', async () => {
    mockApi({ ...circleAnswers('host'), [list]: ok(page(three)) });
    renderApp(at('evenings'));
    const coming = (await screen.findByRole('heading', { name: 'Coming' })).closest('section')!;
    const past = screen.getByRole('heading', { name: 'Past' }).closest('section')!;
    const titles = (part: HTMLElement) =>
      within(part)
        .getAllByRole('link')
        .map((link) => link.textContent);
    expect(titles(coming)).toEqual(['Next', 'Far off']);
    expect(titles(past)).toEqual(['Long ago']);
    expect(within(coming).getAllByText('The boathouse · 16 tunes in 2 sets')).toHaveLength(2);
    expect(within(coming).getByText('Wednesday 14 January 2099, 19:30')).toBeTruthy();
  });

  it('put a live one on top, with its console for those who run it', async () => {
    const live = evening(24, 'Tonight', { status: 'live', startsAt: '2020-01-01T19:30:00.000Z' });
    mockApi({ ...circleAnswers('cohost'), [list]: ok(page([...three, live])) });
    const { unmount } = renderApp(at('evenings'));
    const run = await screen.findByRole('link', { name: 'Run the evening' });
    expect(run.getAttribute('href')).toBe(at(`evenings/${live.id}/live`));
    unmount();
    mockApi({ ...circleAnswers('player'), [list]: ok(page([...three, live])) });
    renderApp(at('evenings'));
    const follow = await screen.findByRole('link', { name: 'Follow' });
    expect(follow.getAttribute('href')).toBe(`/f/${live.code}`);
    expect(screen.queryByRole('link', { name: 'Run the evening' })).toBeNull();
    expect(screen.queryByRole('link', { name: 'Plan an evening' })).toBeNull();
  });

  it('show the code to be copied by hand where the browser withholds the clipboard', async () => {
    mockApi({ ...circleAnswers('host'), [list]: ok(page([evening(22, 'Next')])) });
    renderApp(at('evenings'));
    const button = await screen.findByRole('button', { name: 'Copy the code' });
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: undefined });
    button.click();
    expect((await screen.findByLabelText<HTMLInputElement>('Copy the code')).value).toBe('ABCD2342');
  });

  it('lead a new host from tunes to the first evening', async () => {
    mockApi({ ...circleAnswers('host'), [list]: ok(page([])), [api('GET', '/tunes')]: ok(page([])) });
    const { unmount } = renderApp(at('evenings'));
    expect(await screen.findByRole('heading', { name: 'First, bring your tunes' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Import a list' }).getAttribute('href')).toBe(at('tunes/import'));
    unmount();
    const tunes = api('GET', '/tunes');
    mockApi({ ...circleAnswers('host'), [list]: ok(page([])), [tunes]: ok(page([tune(1, 'A')], 60)) });
    renderApp(at('evenings'));
    expect(await screen.findByRole('heading', { name: 'Your tunes: 60 tunes' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Plan the first evening' })).toBeTruthy();
  });

  it('tell a player that nothing is planned yet', async () => {
    mockApi({ ...circleAnswers('player'), [list]: ok(page([])), [api('GET', '/tunes')]: ok(page([])) });
    renderApp(at('evenings'));
    expect(await screen.findByRole('heading', { name: 'No evening yet' })).toBeTruthy();
  });

  it('say that they could not be loaded', async () => {
    mockApi({ ...circleAnswers('host'), [list]: () => refusal(503, 'unavailable') });
    renderApp(at('evenings'));
    expect(await screen.findByRole('heading', { name: 'The evenings could not be loaded' })).toBeTruthy();
  });
});

describe('planning an evening', () => {
  const create = api('POST', '/sessions');
  const fill = async () => {
    await userEvent.type(await screen.findByLabelText('Title'), 'Second Thursday');
    await userEvent.type(screen.getByLabelText('Date'), '2099-01-14');
    await userEvent.type(screen.getByLabelText('Place'), 'The boathouse');
  };

  it('sends when, where, who retunes and what they arrive tuned to, and goes to the board', async () => {
    let sent: unknown;
    const asked = mockApi({
      ...circleAnswers('host'),
      [create]: (body: unknown) => {
        sent = body;
        return { status: 201, body: { id: id(25) } };
      },
    });
    renderApp(at('evenings/new'));
    await fill();
    await userEvent.selectOptions(screen.getByLabelText('Another instrument that retunes'), 'banjo');
    const banjos = screen.getByRole('group', { name: 'Banjos' });
    await userEvent.selectOptions(within(banjos).getByLabelText('Arrive tuned to'), 'typed');
    await userEvent.type(within(banjos).getByLabelText('Which tuning'), 'gCGCD capo 2');
    await userEvent.click(screen.getByRole('button', { name: 'Plan the evening' }));
    await screen.findByRole('heading', { level: 1 });
    expect(asked).toContain(create);
    expect(sent).toEqual({
      title: 'Second Thursday',
      startsAt: '2099-01-14T19:30',
      timeZone: 'Europe/London',
      place: 'The boathouse',
      chairs: [
        { kind: 'fiddle', count: 1 },
        { kind: 'banjo', count: 1 },
      ],
      openings: { banjo: 'gCGCD capo 2' },
    });
  });

  it('names what is missing or cannot be read, and sends nothing', async () => {
    const asked = mockApi(circleAnswers('host'));
    renderApp(at('evenings/new'));
    const fiddles = await screen.findByRole('group', { name: 'Fiddles' });
    await userEvent.selectOptions(within(fiddles).getByLabelText('Arrive tuned to'), 'typed');
    await userEvent.type(within(fiddles).getByLabelText('Which tuning'), 'GDA');
    await userEvent.clear(within(fiddles).getByLabelText('Fiddles'));
    await userEvent.click(screen.getByRole('button', { name: 'Plan the evening' }));
    expect(await screen.findByText('Give the evening a title.')).toBeTruthy();
    expect(screen.getByText('Say the date.')).toBeTruthy();
    expect(screen.getByText('A whole number, 0 to 200.')).toBeTruthy();
    expect(screen.getByText('A fiddle has 4 strings; GDA names 3: G D A.')).toBeTruthy();
    expect(asked).not.toContain(create);
  });

  it('puts what the server refuses at the fields it concerns', async () => {
    mockApi({
      ...circleAnswers('host'),
      [create]: () =>
        refusal(422, 'cannot-be', {
          startsAt: 'There is no such date.',
          'openings.fiddle': 'Not on this fiddle.',
        }),
    });
    renderApp(at('evenings/new'));
    await fill();
    const fiddles = screen.getByRole('group', { name: 'Fiddles' });
    await userEvent.selectOptions(within(fiddles).getByLabelText('Arrive tuned to'), 'typed');
    await userEvent.type(within(fiddles).getByLabelText('Which tuning'), 'AEAE');
    await userEvent.click(screen.getByRole('button', { name: 'Plan the evening' }));
    expect(await screen.findByText('There is no such date.')).toBeTruthy();
    expect(screen.getByLabelText('Date').getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByText('Not on this fiddle.')).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('Title').value).toBe('Second Thursday');
  });

  it('is not for a player', async () => {
    mockApi({ ...circleAnswers('player'), [list]: ok(page([])), [api('GET', '/tunes')]: ok(page([])) });
    renderApp(at('evenings/new'));
    expect(await screen.findByRole('heading', { name: 'No evening yet' })).toBeTruthy();
  });
});
