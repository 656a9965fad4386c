import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, id, refusal } from './test-circle';

const ada = { accountId: id(2), displayName: 'Ada Weir', email: 'ada@example.org', role: 'host' };
const rosa = { accountId: id(3), displayName: 'Rosa Lind', email: 'rosa@example.org', role: 'player' };
const members = api('GET', '/members');
const add = api('POST', '/members');

describe('people', () => {
  it('shows hosts before players, with their roles', async () => {
    mockApi({ ...circleAnswers('host'), [members]: ok({ items: [rosa, ada] }) });
    renderApp(at('people'));
    await screen.findByText('Rosa Lind');
    const rows = screen.getAllByRole('listitem').map((row) => row.textContent);
    const ofAda = rows.indexOf('Ada Weir (you)ada@example.orghostChange');
    expect(ofAda).toBeGreaterThanOrEqual(0);
    expect(rows.indexOf('Rosa Lindrosa@example.orgplayerChange')).toBe(ofAda + 1);
  });

  it.each(['cohost', 'player'] as const)('lets no %s add anybody', async (role) => {
    mockApi({ ...circleAnswers(role), [members]: ok({ items: [ada, rosa] }) });
    renderApp(at('people'));
    expect(await screen.findByText('Rosa Lind')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Add to the circle' })).toBeNull();
  });

  it('adds somebody in a role', async () => {
    const items = [ada];
    let sent: unknown;
    mockApi({
      ...circleAnswers('host'),
      [members]: () => ({ status: 200, body: { items } }),
      [add]: (body: unknown) => {
        sent = body;
        items.push({ ...rosa, role: 'cohost' });
        return { status: 201, body: { ...rosa, role: 'cohost' } };
      },
    });
    renderApp(at('people'));
    await userEvent.type(await screen.findByLabelText('E-mail of their account'), 'rosa@example.org');
    await userEvent.selectOptions(screen.getByLabelText('As'), 'cohost');
    await userEvent.click(screen.getByRole('button', { name: 'Add to the circle' }));
    expect(await screen.findByText('Rosa Lind is in the circle now.')).toBeTruthy();
    expect(await screen.findByText('Rosa Lind')).toBeTruthy();
    expect(sent).toEqual({ email: 'rosa@example.org', role: 'cohost' });
  });

  it.each([
    [422, 'cannot-be', 'Nobody has an account with this e-mail yet. Ask them to register.'],
    [409, 'already-member', 'Rosa Lind is in this circle already.'],
  ])('says at the field who cannot be added (%i)', async (status, code, sentence) => {
    mockApi({
      ...circleAnswers('host'),
      [members]: ok({ items: [ada] }),
      [add]: () => refusal(status, code, { email: sentence }),
    });
    renderApp(at('people'));
    const field = await screen.findByLabelText<HTMLInputElement>('E-mail of their account');
    await userEvent.type(field, 'rosa@example.org');
    await userEvent.click(screen.getByRole('button', { name: 'Add to the circle' }));
    expect(await screen.findByText(sentence)).toBeTruthy();
    expect(field.getAttribute('aria-invalid')).toBe('true');
    expect(field.value).toBe('rosa@example.org');
  });

  it('gives somebody another role, and says why the last host keeps theirs', async () => {
    const items = [ada, rosa];
    const sent: unknown[] = [];
    mockApi({
      ...circleAnswers('host'),
      [members]: () => ({ status: 200, body: { items } }),
      [api('PATCH', `/members/${rosa.accountId}`)]: (body: unknown) => {
        sent.push(body);
        items[1] = { ...rosa, role: 'cohost' };
        return { status: 200, body: items[1] };
      },
      [api('DELETE', `/members/${ada.accountId}`)]: () =>
        refusal(422, 'cannot-be', { role: 'A circle keeps at least one host.' }),
    });
    renderApp(at('people'));
    await userEvent.click(await screen.findByRole('button', { name: 'Change Rosa Lind' }));
    const dialog = await screen.findByRole('dialog', { name: 'Rosa Lind' });
    await userEvent.selectOptions(within(dialog).getByLabelText('As'), 'cohost');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('Rosa Lind is a cohost now.')).toBeTruthy();
    expect(sent).toEqual([{ role: 'cohost' }]);
    await userEvent.click(screen.getByRole('button', { name: 'Change Ada Weir' }));
    await userEvent.click(await screen.findByRole('button', { name: 'Take out of the circle' }));
    expect(await screen.findByText('A circle keeps at least one host.')).toBeTruthy();
  });

  it('lets a player leave, after asking', async () => {
    const asked = mockApi({
      ...circleAnswers('player'),
      [members]: ok({ items: [ada, rosa] }),
      [api('DELETE', '/membership')]: () => ({ status: 204 }),
    });
    renderApp(at('people'));
    await userEvent.click(await screen.findByRole('button', { name: 'Leave the circle' }));
    expect(asked).not.toContain(api('DELETE', '/membership'));
    await userEvent.click(await screen.findByRole('button', { name: 'Leave' }));
    expect(await screen.findByText('You have left Heron Weir Circle.')).toBeTruthy();
    expect(asked).toContain(api('DELETE', '/membership'));
  });

  it('asks for an address before sending', async () => {
    const asked = mockApi({ ...circleAnswers('host'), [members]: ok({ items: [ada] }) });
    renderApp(at('people'));
    await userEvent.click(await screen.findByRole('button', { name: 'Add to the circle' }));
    expect(await screen.findByText('An e-mail address is missing.')).toBeTruthy();
    expect(asked).not.toContain(add);
  });

  it('says that the people could not be loaded', async () => {
    mockApi({ ...circleAnswers('host'), [members]: () => refusal(503, 'unavailable') });
    renderApp(at('people'));
    expect(await screen.findByRole('heading', { name: 'The people could not be loaded' })).toBeTruthy();
  });
});
