import { screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { mockApi, ok } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, id, page, refusal } from './test-circle';

const history = api('GET', '/history');
const event = {
  ...{ id: id(9), at: '2027-01-14T19:30:00.000Z', what: 'tune.changed', who: 'Rosa Lind', subjectId: id(5) },
  ...{ subject: 'Slack Tide', changed: ['key'], role: null, counts: null },
};

describe('what happened', () => {
  it('says who changed what and when, in the circle’s time', async () => {
    mockApi({ ...circleAnswers('cohost'), [history]: ok(page([event])) });
    renderApp(at('history'));
    const row = await screen.findByText('changed the tune Slack Tide: its key');
    expect(row.closest('li')?.textContent).toContain('Rosa Lind changed the tune Slack Tide: its key');
    expect(screen.getByText(/14 January.*19:30/)).toBeTruthy();
  });

  it('says that nothing happened yet, and that it could not be loaded', async () => {
    mockApi({ ...circleAnswers('host'), [history]: ok(page([])) });
    const { unmount } = renderApp(at('history'));
    expect(await screen.findByRole('heading', { name: 'Nothing was changed yet' })).toBeTruthy();
    unmount();
    mockApi({ ...circleAnswers('host'), [history]: () => refusal(503, 'unavailable') });
    renderApp(at('history'));
    expect(await screen.findByRole('heading', { name: 'What happened could not be loaded' })).toBeTruthy();
  });
});
