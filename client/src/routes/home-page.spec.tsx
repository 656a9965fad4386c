import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok } from '../lib/mock-api';
import { renderApp } from './test-app';

const user = { id: 'u1', email: 'ada@example.org', displayName: 'Ada Weir', confirmed: true };
const circle = {
  id: 'c1',
  name: 'Heron Weir Circle',
  role: 'host',
  timeZone: 'Europe/London',
  referenceA: 440,
  can: ['circle.read'],
};

describe('the first page', () => {
  it('leads somebody without a circle to making one', async () => {
    const circles: unknown[] = [];
    mockApi({
      'GET /api/auth/me': () => ({ status: 200, body: { user, circles } }),
      'POST /api/circles': (body: unknown) => {
        expect(body).toMatchObject({ name: 'Heron Weir Circle', timeZone: 'Europe/London' });
        circles.push({ id: 'c1', name: 'Heron Weir Circle', role: 'host' });
        return { status: 201, body: circle };
      },
      'GET /api/circles/c1': ok(circle),
    });
    renderApp('/');
    expect(await screen.findByRole('heading', { level: 1, name: 'Make your first circle' })).toBeTruthy();
    await userEvent.type(screen.getByLabelText('Name of the circle'), 'Heron Weir Circle');
    await userEvent.selectOptions(screen.getByLabelText('Time zone'), 'Europe/London');
    await userEvent.click(screen.getByRole('button', { name: 'Make the circle' }));
    // In the circle: its name and the reader's role stand in the header.
    expect(await screen.findByText('Heron Weir Circle · host')).toBeTruthy();
  });

  it('asks for a name before sending', async () => {
    const asked = mockApi({ 'GET /api/auth/me': ok({ user, circles: [] }) });
    renderApp('/');
    await userEvent.click(await screen.findByRole('button', { name: 'Make the circle' }));
    expect(await screen.findByText('Give the circle a name.')).toBeTruthy();
    expect(asked).not.toContain('POST /api/circles');
  });

  it('says when the server does not answer, and asks again', async () => {
    let up = false;
    mockApi({
      'GET /api/auth/me': () =>
        up
          ? { status: 200, body: { user, circles: [circle] } }
          : { status: 503, body: { status: 503, code: 'unavailable', detail: 'The database is away.' } },
    });
    renderApp('/');
    expect(await screen.findByText('The database is away.')).toBeTruthy();
    up = true;
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByRole('link', { name: /Heron Weir Circle/ })).toBeTruthy();
  });
});

describe('the frame', () => {
  const signedIn = { 'GET /api/auth/me': ok({ user, circles: [circle] }), 'GET /api/circles/c1': ok(circle) };

  it('has a way past the header, one h1, and marks the page one is on', async () => {
    mockApi(signedIn);
    renderApp('/c/c1/people');
    expect(await screen.findByRole('heading', { level: 1 })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Skip to the page' }).getAttribute('href')).toBe('#main');
    expect(screen.getByRole('link', { name: 'People' }).getAttribute('aria-current')).toBe('page');
    expect(screen.getByRole('link', { name: 'Tunes' }).getAttribute('aria-current')).toBeNull();
  });

  it('says that a circle is not there, or not yours', async () => {
    mockApi({ 'GET /api/auth/me': ok({ user, circles: [] }) });
    renderApp('/c/c9/people');
    expect(await screen.findByText('There is nothing here.')).toBeTruthy();
    expect(screen.getByRole('link', { name: 'To your circles' })).toBeTruthy();
  });

  it('switches the light and remembers it', async () => {
    mockApi(signedIn);
    renderApp('/');
    await userEvent.click(await screen.findByRole('button', { name: 'Switch to lamp light' }));
    expect(document.documentElement.dataset['light']).toBe('lamp');
    expect(localStorage.getItem('pegwell-light-desk')).toBe('lamp');
    await userEvent.click(screen.getByRole('button', { name: 'Switch to day light' }));
    expect(document.documentElement.dataset['light']).toBe('day');
  });

  it('signs out and forgets what was loaded', async () => {
    let inside = true;
    mockApi({
      'GET /api/auth/me': () =>
        inside ? { status: 200, body: { user, circles: [circle] } } : { status: 401 },
      'POST /api/auth/logout': () => {
        inside = false;
        return { status: 204 };
      },
    });
    renderApp('/');
    await userEvent.click(await screen.findByRole('button', { name: 'Account of Ada Weir' }));
    await userEvent.click(await screen.findByRole('menuitem', { name: 'Sign out' }));
    expect(await screen.findByRole('heading', { level: 1, name: 'Sign in' })).toBeTruthy();
  });

  it('shows the sign-in page when the sign-in ends under one’s hands', async () => {
    mockApi({
      'GET /api/auth/me': ok({ user, circles: [circle] }),
      'GET /api/circles/c1': () => ({ status: 401, body: { status: 401, code: 'not-signed-in' } }),
    });
    renderApp('/c/c1/people');
    expect(await screen.findByRole('heading', { level: 1, name: 'Sign in' })).toBeTruthy();
  });
});
