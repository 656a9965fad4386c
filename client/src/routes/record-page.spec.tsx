import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';

const user = { id: 'u1', email: 'ada@example.org', displayName: 'Ada Weir', confirmed: true };
const circle = {
  id: 'c1',
  name: 'Heron Weir Circle',
  role: 'player',
  timeZone: 'Europe/Berlin',
  referenceA: 440,
  can: [],
};
const session = {
  title: 'Thursday at the Old Mill',
  startsAt: '2027-01-14T18:30:00.000Z',
  timeZone: 'Europe/Berlin',
};
const play = { sessionId: 's1', tuneId: null, mode: 'major', session };

function open(plays: Answers[string]) {
  mockApi({
    'GET /api/auth/me': ok({ user, circles: [circle] }),
    'GET /api/circles/c1': ok(circle),
    'GET /api/circles/c1/plays': plays,
  });
  renderApp('/c/c1/record');
}

describe('the record page', () => {
  it('shows evenings with what was played, when, and how long stops took', async () => {
    const items = [
      {
        ...play,
        id: 'p2',
        entryId: 'e2',
        title: null,
        key: 'A',
        mode: 'modal',
        tunings: { fiddle: 'AEAE', banjo: 'gDGCD capo 2' },
        calledAt: '2027-01-14T18:37:00.000Z',
        playingAt: '2027-01-14T18:39:30.000Z',
        endedAt: '2027-01-14T18:46:00.000Z',
      },
      {
        ...play,
        id: 'p1',
        entryId: 'e1',
        title: 'Ford Lane Reel',
        key: 'D',
        tunings: { fiddle: 'GDAE', banjo: null },
        calledAt: '2027-01-14T18:31:00.000Z',
        playingAt: '2027-01-14T18:31:00.000Z',
        endedAt: '2027-01-14T18:37:00.000Z',
      },
    ];
    open(ok({ items, total: 2, page: 1, pageSize: 100 }));
    expect(await screen.findByRole('heading', { level: 2, name: 'Thursday at the Old Mill' })).toBeTruthy();
    expect(
      screen.getByText(/Thursday 14 January.*2 tunes, 15 min; 1 stop to tune, 2½ min on average/),
    ).toBeTruthy();
    // Times of the hall: UTC+1 in Berlin in January (IANA tz database).
    expect(
      within(screen.getByRole('main'))
        .getAllByRole('listitem')
        .map((row) => row.textContent.replace(/\s+/g, ' ')),
    ).toEqual([
      '19:31Ford Lane Reel DFiddle GDAE6 min',
      '19:37A modal tunes open placeFiddle AEAEBanjo gDGCD capo 2tuned 2½ min6½ min',
    ]);
  });

  it('says what to do first where nothing was played', async () => {
    open(ok({ items: [], total: 0, page: 1, pageSize: 100 }));
    expect(await screen.findByRole('heading', { name: 'Nothing was played yet' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'To the evenings' })).toBeTruthy();
  });

  it('says when it cannot be loaded, and asks again', async () => {
    let away = true;
    open(() =>
      away
        ? { status: 503, body: { status: 503, code: 'unavailable', detail: 'The database is away.' } }
        : { status: 200, body: { items: [], total: 0, page: 1, pageSize: 100 } },
    );
    expect(await screen.findByText('The database is away.')).toBeTruthy();
    away = false;
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByRole('heading', { name: 'Nothing was played yet' })).toBeTruthy();
  });
});
