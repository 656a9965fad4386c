import type { SignIn } from '@pegwell/shared/contract/accounts';
import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';
import { id, refusal } from './test-circle';

const user = { id: id(2), email: 'ada@example.org', displayName: 'Ada Weir', confirmed: true };
const signIn = (number: number, device: string, here = false): SignIn => ({
  ...{ id: id(number), device, here },
  begunAt: '2026-11-01T10:00:00.000Z',
  usedAt: '2026-11-30T18:30:00.000Z',
});
const answers: Answers = {
  'GET /api/auth/me': ok({ user, circles: [] }),
  'GET /api/mail': ok({ sends: true }),
  'GET /api/auth/sign-ins': ok({
    items: [signIn(10, 'Firefox on Linux', true), signIn(11, 'Safari on an iPhone')],
  }),
};
const section = async (name: string) => within(await screen.findByRole('region', { name }));

describe('the account page', () => {
  it('is reached from the menu and changes the name, which the header shows', async () => {
    let { displayName } = user;
    mockApi({
      ...answers,
      'GET /api/auth/me': () => ({ status: 200, body: { user: { ...user, displayName }, circles: [] } }),
      'PATCH /api/auth/me': (body) => {
        ({ displayName } = body as { displayName: string });
        return { status: 200, body: { ...user, displayName } };
      },
    });
    renderApp('/');
    await userEvent.click(await screen.findByRole('button', { name: 'Account of Ada Weir' }));
    await userEvent.click(await screen.findByRole('menuitem', { name: 'Your account' }));
    const name = await section('Name');
    const field = name.getByLabelText('Your name');
    await userEvent.clear(field);
    await userEvent.type(field, 'Ada Fell');
    await userEvent.click(name.getByRole('button', { name: 'Save the name' }));
    expect(await screen.findByRole('button', { name: 'Account of Ada Fell' })).toBeTruthy();
  });

  it('puts a wrong present password at its field and stays signed in', async () => {
    mockApi({
      ...answers,
      'POST /api/auth/password': () =>
        refusal(422, 'wrong-password', { current: 'This is not your password.' }),
    });
    renderApp('/account');
    const password = await section('Password');
    await userEvent.type(password.getByLabelText('Present password'), 'not this one');
    await userEvent.type(password.getByLabelText('New password'), 'four unrelated words');
    await userEvent.click(password.getByRole('button', { name: 'Change the password' }));
    expect(await password.findByText('This is not your password.')).toBeTruthy();
    expect(password.getByLabelText('Present password').getAttribute('aria-invalid')).toBe('true');
  });

  it('says that the address changes by its own mail', async () => {
    mockApi({ ...answers, 'POST /api/auth/email': () => ({ status: 204 }) });
    renderApp('/account');
    const address = await section('E-mail address');
    await userEvent.type(await address.findByLabelText('Another address'), 'ada@elsewhere.example');
    await userEvent.type(address.getByLabelText('Your password'), 'seven crooked tunes');
    await userEvent.click(address.getByRole('button', { name: 'Change the address' }));
    expect(await address.findByText(/A mail went to ada@elsewhere.example/)).toBeTruthy();
    expect(address.getByText(/You sign in with/).textContent).toContain(user.email);
  });

  it('says so where the server sends no mail', async () => {
    mockApi({ ...answers, 'GET /api/mail': ok({ sends: false }) });
    renderApp('/account');
    const address = await section('E-mail address');
    expect(await address.findByText(/This server sends no mail/)).toBeTruthy();
    expect(address.queryByLabelText('Another address')).toBeNull();
  });

  it('ends one sign-in, and all others', async () => {
    let items = [
      signIn(10, 'Firefox on Linux', true),
      signIn(11, 'Safari on an iPhone'),
      signIn(12, 'A program'),
    ];
    mockApi({
      ...answers,
      'GET /api/auth/sign-ins': () => ({ status: 200, body: { items } }),
      [`DELETE /api/auth/sign-ins/${id(11)}`]: () => {
        items = items.filter((one) => one.id !== id(11));
        return { status: 204 };
      },
      'DELETE /api/auth/sign-ins': () => {
        items = items.filter(({ here }) => here);
        return { status: 204 };
      },
    });
    renderApp('/account');
    const list = await section('Where you are signed in');
    expect((await list.findByText('Firefox on Linux')).closest('li')?.textContent).toContain('this one');
    await userEvent.click(list.getByRole('button', { name: /^End Safari on an iPhone/ }));
    await expect.poll(() => list.queryByText('Safari on an iPhone')).toBeNull();
    await userEvent.click(list.getByRole('button', { name: 'End all others' }));
    await expect.poll(() => list.getAllByRole('listitem').length).toBe(1);
    expect(list.queryByRole('button')).toBeNull();
  });

  it('offers the data as a file', async () => {
    mockApi(answers);
    renderApp('/account');
    const link = (await section('Your data')).getByRole('link', { name: 'Download my data' });
    expect(link.getAttribute('href')).toBe('/api/auth/me/data');
    expect(link.hasAttribute('download')).toBe(true);
  });

  describe('deleting', () => {
    const press = async () => {
      await userEvent.click(await screen.findByRole('button', { name: 'Delete my account …' }));
      const dialog = within(await screen.findByRole('dialog'));
      await userEvent.type(dialog.getByLabelText('Your password'), 'seven crooked tunes');
      await userEvent.click(dialog.getByRole('button', { name: 'Delete my account' }));
      return dialog;
    };

    it('tells the only host of a circle to hand it over first', async () => {
      mockApi({
        ...answers,
        'POST /api/auth/me/delete': () => ({
          status: 422,
          body: { status: 422, code: 'sole-host', detail: 'You are the only host of Heron Weir Circle.' },
        }),
      });
      renderApp('/account');
      const dialog = await press();
      expect(await dialog.findByText('You are the only host of Heron Weir Circle.')).toBeTruthy();
    });

    it('leads out when it is done', async () => {
      mockApi({ ...answers, 'POST /api/auth/me/delete': () => ({ status: 204 }) });
      renderApp('/account');
      await press();
      expect(await screen.findByRole('heading', { name: 'Sign in' })).toBeTruthy();
    });
  });
});
