import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi } from '../lib/mock-api';
import { renderApp } from './test-app';
import { safeNext } from './use-after-sign-in';

const user = { id: 'u1', email: 'ada@example.org', displayName: 'Ada Weir', confirmed: true };
const circles = [{ id: 'c1', name: 'Heron Weir Circle', role: 'host' }];
const nobody = () => ({
  status: 401,
  body: { status: 401, code: 'not-signed-in', detail: 'Sign in first.' },
});

/** A server where signing in works: afterwards `me` is Ada. */
function door(login: (body: unknown) => { status: number; body?: unknown }) {
  let inside = false;
  return mockApi({
    'GET /api/auth/me': () => (inside ? { status: 200, body: { user, circles } } : nobody()),
    'POST /api/auth/login': (body: unknown) => {
      const answer = login(body);
      inside = answer.status === 200;
      return answer;
    },
    'POST /api/auth/register': (body: unknown) => {
      const answer = login(body);
      inside = answer.status === 201;
      return answer;
    },
  });
}

describe('the sign-in page', () => {
  it('signs in and leads to the circles', async () => {
    door((body) => {
      expect(body).toEqual({ email: 'ada@example.org', password: 'four unrelated words' });
      return { status: 200, body: { user } };
    });
    renderApp('/');
    await userEvent.type(await screen.findByLabelText('E-mail'), 'ada@example.org');
    await userEvent.type(screen.getByLabelText('Password'), 'four unrelated words');
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByRole('heading', { level: 1, name: 'Your circles' })).toBeTruthy();
    expect(screen.getByRole('link', { name: /Heron Weir Circle/ }).getAttribute('href')).toBe(
      '/c/c1/evenings',
    );
  });

  it('says what is missing at the field, without asking the server', async () => {
    const asked = door(() => ({ status: 500 }));
    renderApp('/sign-in');
    await userEvent.click(await screen.findByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('Type your e-mail address.')).toBeTruthy();
    const email = screen.getByLabelText('E-mail');
    expect(email.getAttribute('aria-invalid')).toBe('true');
    const described = document.getElementById(
      email.getAttribute('aria-describedby')?.split(' ').at(-1) ?? '',
    );
    expect(described?.textContent).toBe('Type your e-mail address.');
    expect(asked).not.toContain('POST /api/auth/login');
  });

  it('shows the refusal of a wrong password and keeps what was typed', async () => {
    door(() => ({
      status: 401,
      body: {
        status: 401,
        code: 'wrong-credentials',
        detail: 'This e-mail and password do not go together.',
      },
    }));
    renderApp('/sign-in');
    await userEvent.type(await screen.findByLabelText('E-mail'), 'ada@example.org');
    await userEvent.type(screen.getByLabelText('Password'), 'not this one');
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('This e-mail and password do not go together.')).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('E-mail').value).toBe('ada@example.org');
  });
});

describe('the register page', () => {
  const fill = async (password: string) => {
    await userEvent.type(await screen.findByLabelText('Your name'), 'Ada Weir');
    await userEvent.type(screen.getByLabelText('E-mail'), 'ada@example.org');
    await userEvent.type(screen.getByLabelText('Password'), password);
    await userEvent.click(screen.getByRole('button', { name: 'Make an account' }));
  };

  it('makes an account and leads on', async () => {
    door(() => ({ status: 201, body: { user } }));
    renderApp('/register');
    await fill('four unrelated words');
    expect(await screen.findByRole('heading', { level: 1, name: 'Your circles' })).toBeTruthy();
  });

  it('refuses a short password by the server’s own schema', async () => {
    const asked = door(() => ({ status: 201 }));
    renderApp('/register');
    await fill('short');
    expect(await screen.findByText('At least 10 characters.')).toBeTruthy();
    expect(asked).not.toContain('POST /api/auth/register');
  });

  it('puts a taken e-mail at its field', async () => {
    door(() => ({
      status: 409,
      body: {
        status: 409,
        code: 'email-taken',
        detail: 'An account with this e-mail exists.',
        errors: [{ path: 'email', message: 'An account with this e-mail exists: sign in.' }],
      },
    }));
    renderApp('/register');
    await fill('four unrelated words');
    expect(await screen.findByText('An account with this e-mail exists: sign in.')).toBeTruthy();
    expect(screen.getByLabelText('E-mail').getAttribute('aria-invalid')).toBe('true');
  });
});

describe('where one goes after signing in', () => {
  it.each([
    ['/c/1/tunes?page=2', '/c/1/tunes?page=2'],
    ['//elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
    ['https://elsewhere.example', '/'],
    [null, '/'],
  ])('%s leads to %s', (next, path) => expect(safeNext(next)).toBe(path));
});
