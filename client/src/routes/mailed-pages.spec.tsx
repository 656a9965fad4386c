import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';
import { refusal } from './test-circle';

const user = { id: 'u1', email: 'ada@example.org', displayName: 'Ada Weir', confirmed: false };
const nobody = () => refusal(401, 'not-signed-in');
const over = () => ({
  status: 410,
  body: {
    status: 410,
    code: 'link-over',
    detail: 'This link was used, is too old, or a newer one was sent.',
  },
});
const outside: Answers = { 'GET /api/auth/me': nobody, 'GET /api/mail': ok({ sends: true }) };
const inside: Answers = { ...outside, 'GET /api/auth/me': ok({ user, circles: [] }) };

describe('the page for a forgotten password', () => {
  it('is found from signing in, and says the same whoever asks', async () => {
    const sent: unknown[] = [];
    mockApi({
      ...outside,
      'POST /api/auth/forgot': (body) => {
        sent.push(body);
        return { status: 204 };
      },
    });
    renderApp('/sign-in');
    await userEvent.click(await screen.findByRole('link', { name: 'Forgot your password?' }));
    await screen.findByRole('button', { name: 'Send me a link' });
    await userEvent.type(screen.getByLabelText('E-mail'), 'ada@example.org');
    await userEvent.click(screen.getByRole('button', { name: 'Send me a link' }));
    expect(await screen.findByRole('heading', { name: 'Look at your mail' })).toBeTruthy();
    // Whoever hears the page hears it from its beginning.
    expect(document.activeElement?.id).toBe('main');
    expect(screen.getByText(/If an account has the address/).textContent).toContain('ada@example.org');
    expect(sent).toEqual([{ email: 'ada@example.org' }]);
  });

  it('says what is no address at the field, without asking the server', async () => {
    const asked = mockApi(outside);
    renderApp('/forgot');
    await userEvent.type(await screen.findByLabelText('E-mail'), 'ada');
    await userEvent.click(screen.getByRole('button', { name: 'Send me a link' }));
    expect(await screen.findByText('This is not an e-mail address.')).toBeTruthy();
    expect(asked).not.toContain('POST /api/auth/forgot');
  });

  it('says where the server sends no mail', async () => {
    mockApi({ ...outside, 'GET /api/mail': ok({ sends: false }) });
    renderApp('/forgot');
    expect(await screen.findByText(/This server sends no mail/)).toBeTruthy();
    expect(screen.queryByLabelText('E-mail')).toBeNull();
  });
});

describe('the page of a reset link', () => {
  it('takes a new password with what stands behind the #, and signs everybody out', async () => {
    const sent: unknown[] = [];
    mockApi({
      ...inside,
      'POST /api/auth/reset': (body) => {
        sent.push(body);
        return { status: 204 };
      },
    });
    renderApp('/reset#the-token');
    await userEvent.type(await screen.findByLabelText('New password'), 'four unrelated words');
    await userEvent.click(screen.getByRole('button', { name: 'Take this password' }));
    expect(await screen.findByRole('heading', { name: 'Your password is the new one' })).toBeTruthy();
    expect(sent).toEqual([{ token: 'the-token', password: 'four unrelated words' }]);
    await expect.poll(() => screen.queryByRole('button', { name: /Account of/ })).toBeNull();
  });

  it('says that a link is over, and leads to another', async () => {
    mockApi({ ...outside, 'POST /api/auth/reset': over });
    renderApp('/reset#the-token');
    await userEvent.type(await screen.findByLabelText('New password'), 'four unrelated words');
    await userEvent.click(screen.getByRole('button', { name: 'Take this password' }));
    expect(await screen.findByText(/This link was used/)).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Ask for another mail' }).getAttribute('href')).toBe('/forgot');
  });

  it('asks for the whole link where a part of it is missing', async () => {
    mockApi(outside);
    renderApp('/reset');
    expect(await screen.findByText(/The link is not whole/)).toBeTruthy();
    expect(screen.queryByLabelText('New password')).toBeNull();
  });
});

describe('the page of a confirming link', () => {
  it('changes nothing until it is pressed', async () => {
    let confirmed = false;
    const asked = mockApi({
      ...inside,
      'GET /api/auth/me': () => ({ status: 200, body: { user: { ...user, confirmed }, circles: [] } }),
      'POST /api/auth/confirm': (body) => {
        expect(body).toEqual({ token: 'the-token' });
        confirmed = true;
        return { status: 200, body: { email: user.email } };
      },
    });
    renderApp('/confirm#the-token');
    const button = await screen.findByRole('button', { name: 'Confirm this address' });
    expect(asked).not.toContain('POST /api/auth/confirm');
    await userEvent.click(button);
    expect(await screen.findByRole('heading', { name: 'Your address is confirmed' })).toBeTruthy();
    await userEvent.click(screen.getByRole('link', { name: 'To your circles' }));
    await screen.findByRole('heading', { name: 'Make your first circle' });
    expect(screen.queryByRole('button', { name: 'Send it again' })).toBeNull();
  });

  it('says that a link is over', async () => {
    mockApi({ ...outside, 'POST /api/auth/confirm': over });
    renderApp('/confirm#the-token');
    await userEvent.click(await screen.findByRole('button', { name: 'Confirm this address' }));
    expect(await screen.findByText(/This link was used/)).toBeTruthy();
  });
});

describe('the line of an address that waits', () => {
  it('sends the mail again', async () => {
    const asked = mockApi({ ...inside, 'POST /api/auth/confirm/again': () => ({ status: 204 }) });
    renderApp('/');
    await userEvent.click(await screen.findByRole('button', { name: 'Send it again' }));
    expect(await screen.findByText(/A new mail is on its way/)).toBeTruthy();
    expect(asked).toContain('POST /api/auth/confirm/again');
  });

  it('is not there on a server that sends no mail', async () => {
    const asked = mockApi({ ...inside, 'GET /api/mail': ok({ sends: false }) });
    renderApp('/');
    await screen.findByRole('heading', { name: 'Make your first circle' });
    await expect.poll(() => asked).toContain('GET /api/mail');
    expect(screen.queryByRole('button', { name: 'Send it again' })).toBeNull();
  });
});
