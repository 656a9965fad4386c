import type { LiveState, LiveStep } from '@pegwell/shared/contract/live';
import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { liveState, session } from '../features/live/console-fixtures';
import { follow, tune } from '../features/live/follow-fixtures';
import { mockApi, ok, type Answer } from '../lib/mock-api';
import { renderApp } from './test-app';

const user = { id: 'u1', email: 'ada@example.org', displayName: 'Ada Weir', confirmed: true };
const circle = {
  id: 'c1',
  name: 'Heron Weir Circle',
  role: 'host',
  timeZone: 'Europe/Berlin',
  referenceA: 440,
  can: ['circle.read', 'live.run'],
};

/** A server that stands at `state` and answers steps with `answer`. */
function serve(start: LiveState, answer: (step: LiveStep, state: LiveState) => Answer | LiveState) {
  const server = { state: start, steps: [] as LiveStep[] };
  mockApi({
    'GET /api/auth/me': ok({ user, circles: [circle] }),
    'GET /api/circles/c1': ok(circle),
    'GET /api/sessions/s1': () => ({ status: 200, body: session({ status: server.state.status }) }),
    'GET /api/sessions/s1/live': () => ({ status: 200, body: server.state }),
    'POST /api/sessions/s1/live': (body) => {
      const step = body as LiveStep;
      server.steps.push(step);
      const given = answer(step, server.state);
      if ('status' in given && typeof given.status === 'number') return given;
      server.state = given;
      return { status: 200, body: server.state };
    },
    'GET /api/follow/QGQE34ES': () => ({
      status: 200,
      body: follow({
        version: server.state.liveVersion,
        kinds: ['fiddle'],
        now: { ...tune(1, 'Ford Lane Reel', 'GDAE'), phase: server.state.phase ?? 'playing' },
        next: tune(2, 'Slack Tide', 'AEAE', 'GDAE'),
      }),
    }),
  });
  renderApp('/c/c1/evenings/s1/live');
  return server;
}

const steps = () => within(screen.getByRole('group', { name: 'Steps' }));
const press = async (name: string | RegExp) => userEvent.click(await screen.findByRole('button', { name }));
const now = async (name: string) =>
  expect(await screen.findByRole('heading', { level: 2, name })).toBeTruthy();

describe('the host’s console', () => {
  beforeEach(() => localStorage.clear());

  it('starts an evening that has not begun', async () => {
    const server = serve(
      liveState({ status: 'planned', nowEntryId: null, phase: null, liveVersion: 0, called: [] }),
      () => liveState(),
    );
    await now('Not begun yet');
    expect(screen.getByText('First comes Ford Lane Reel.')).toBeTruthy();
    await press('Start the evening');
    await now('Ford Lane Reel');
    expect(server.steps).toMatchObject([{ action: 'start', liveVersion: 0 }]);
  });

  it('takes steps with the version it saw and an id of each press', async () => {
    const server = serve(liveState(), ({ action }, state) => ({
      ...state,
      liveVersion: state.liveVersion + 1,
      nowEntryId: 'e2',
      called: ['e1', 'e2'],
      phase: action === 'retuned' ? 'playing' : 'tuning',
    }));
    await press(/^Next Slack Tide/);
    await now('Slack Tide');
    expect(screen.getByText('Coming now · the room tunes')).toBeTruthy();
    await press('Everyone is in tune');
    expect(await screen.findByText('Playing now')).toBeTruthy();
    expect(server.steps).toMatchObject([
      { action: 'next', liveVersion: 1 },
      { action: 'retuned', liveVersion: 2 },
    ]);
    const ids = server.steps.map(({ actionId }) => actionId);
    expect(new Set(ids).size).toBe(2);
    expect(ids[0]).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('keeps the keyboard on the likeliest step when the pressed one is gone', async () => {
    serve(liveState({ phase: 'tuning' }), (_, state) => ({ ...state, liveVersion: 2, phase: 'playing' }));
    (await screen.findByRole('button', { name: 'Everyone is in tune' })).focus();
    await userEvent.keyboard('{Enter}');
    expect(await screen.findByText('Playing now')).toBeTruthy();
    expect(document.activeElement?.textContent).toBe('Next Slack Tide');
  });

  it('sends a step again under the same id when its answer was lost', async () => {
    let lost = true;
    const server = serve(liveState(), (_, state) => {
      if (lost) {
        lost = false;
        return { status: 503, body: { status: 503, code: 'unavailable', detail: 'Away.' } };
      }
      return { ...state, liveVersion: 2, nowEntryId: 'e2', called: ['e1', 'e2'] };
    });
    await press(/^Next/);
    expect(
      await screen.findByRole('heading', { level: 2, name: 'Slack Tide' }, { timeout: 3_000 }),
    ).toBeTruthy();
    expect(server.steps).toHaveLength(2);
    expect(server.steps[1]).toEqual(server.steps[0]);
  });

  it('takes in the step of another host, and says so', async () => {
    serve(liveState(), (_, state) => {
      const current = { ...state, liveVersion: 5, nowEntryId: 'e3', called: ['e1', 'e3'] };
      return {
        status: 409,
        body: { status: 409, code: 'changed', detail: 'Another step was taken meanwhile.', current },
      };
    });
    await press(/^Next/);
    await now('Lantern Hill');
    expect(screen.getByText('Another step was taken meanwhile.')).toBeTruthy();
  });

  it('shows what each kind has and has to turn, now and next', async () => {
    serve(liveState(), (_, state) => state);
    const kinds = within(await screen.findByRole('region', { name: 'Who turns what' }));
    expect(kinds.getByRole('heading', { name: '5 fiddles' })).toBeTruthy();
    expect(kinds.getByText('next, Slack Tide')).toBeTruthy();
    expect(kinds.getByText('G peg up a whole step, to A; D peg up a whole step, to E')).toBeTruthy();
  });

  it('goes to any tune of the order', async () => {
    const server = serve(liveState(), (_, state) => ({
      ...state,
      liveVersion: 2,
      nowEntryId: 'e3',
      called: ['e1', 'e3'],
    }));
    await press('Go to Lantern Hill');
    await now('Lantern Hill');
    expect(server.steps).toMatchObject([{ action: 'goto', entryId: 'e3' }]);
    const order = within(screen.getByRole('region', { name: 'The order' }));
    expect(order.getByText('now').closest('li')?.textContent).toMatch(/Lantern Hill/);
  });

  it('does not offer a step back from the first tune', async () => {
    serve(liveState(), (_, state) => state);
    await now('Ford Lane Reel');
    expect(steps().getByRole('button', { name: 'Back' }).getAttribute('aria-disabled')).toBe('true');
  });

  it('asks before it finishes', async () => {
    const server = serve(liveState(), (_, state) => ({
      ...state,
      liveVersion: 2,
      status: 'finished',
      nowEntryId: null,
      phase: null,
    }));
    await press('Finish the evening');
    const dialog = within(await screen.findByRole('dialog'));
    expect(dialog.getByText(/2 tunes on the board were not called/)).toBeTruthy();
    await userEvent.click(dialog.getByRole('button', { name: 'Play on' }));
    expect(server.steps).toEqual([]);
    await press('Finish the evening');
    await userEvent.click(within(await screen.findByRole('dialog')).getByRole('button', { name: 'Finish' }));
    await now('Good night');
  });

  it('shows how players follow', async () => {
    serve(liveState(), (_, state) => state);
    expect(await screen.findByText('QGQE 34ES')).toBeTruthy();
    expect(screen.getByText('https://tunes.example.org/f')).toBeTruthy();
    expect(
      await screen.findByRole('img', { name: 'Code to scan: https://tunes.example.org/f/QGQE34ES' }),
    ).toBeTruthy();
  });

  it('lets a player look on without a button to press', async () => {
    mockApi({
      'GET /api/auth/me': ok({ user, circles: [circle] }),
      'GET /api/circles/c1': ok(circle),
      'GET /api/sessions/s1': ok(session({ can: ['sessions.read'] })),
      'GET /api/sessions/s1/live': ok(liveState()),
      'GET /api/follow/QGQE34ES': ok(follow()),
    });
    renderApp('/c/c1/evenings/s1/live');
    await now('Ford Lane Reel');
    expect(screen.queryByRole('group', { name: 'Steps' })).toBeNull();
    expect(screen.queryByRole('button', { name: /Go to|Finish/ })).toBeNull();
  });
});
