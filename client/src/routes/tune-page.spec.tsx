import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, page, refusal, shown, tune } from './test-circle';

const hen = tune(11, 'Cluck Old Hen', { notes: 'Two low parts.' });
const one = `/tunes/${hen.id}`;
const edit = at(`tunes/${hen.id}/edit`);

describe('a tune', () => {
  it('is read by a player, with the pegs that lead to its tuning, and not changed', async () => {
    mockApi({ ...circleAnswers('player'), [api('GET', one)]: ok(hen) });
    renderApp(at(`tunes/${hen.id}`));
    expect(await screen.findByRole('heading', { level: 1, name: 'Cluck Old Hen' })).toBeTruthy();
    expect(
      screen.getByText('From standard: G peg up a whole step, to A; D peg up a whole step, to E'),
    ).toBeTruthy();
    expect(screen.getByText('Two low parts.')).toBeTruthy();
    expect(screen.getByText(/The string maker's advice and a luthier come first/)).toBeTruthy();
    expect(screen.queryByRole('link', { name: 'Edit' })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Remove' })).toBeNull();
  });

  it('warns of a string that can break', async () => {
    // score.md, words of safety: a banjo's fifth has a caution on any raise above standard.
    const openD = { kind: 'banjo', accepted: [shown('banjo', 'aDF#AD')] };
    mockApi({ ...circleAnswers('player'), [api('GET', one)]: ok({ ...hen, tunings: [openD], assumed: [] }) });
    renderApp(at(`tunes/${hen.id}`));
    expect(await screen.findByText(/g peg \(5th\): .*The string can break/)).toBeTruthy();
  });

  it('is removed, and comes back by Undo', async () => {
    const asked = mockApi({
      ...circleAnswers('host'),
      [api('GET', '/tunes')]: ok(page([tune(12, 'Slack Tide')])),
      [api('GET', one)]: ok(hen),
      [api('DELETE', one)]: () => ({ status: 204 }),
      [api('POST', `${one}/restore`)]: ok(hen),
    });
    renderApp(at(`tunes/${hen.id}`));
    await userEvent.click(await screen.findByRole('button', { name: 'Remove' }));
    expect(await screen.findByRole('heading', { level: 1, name: 'Tunes' })).toBeTruthy();
    await userEvent.click(await screen.findByRole('button', { name: 'Undo' }));
    expect(await screen.findByText('“Cluck Old Hen” is back.')).toBeTruthy();
    expect(asked).toContain(api('POST', `${one}/restore`));
  });

  it('says when it is not there', async () => {
    mockApi(circleAnswers('host'));
    renderApp(at(`tunes/${hen.id}`));
    expect(await screen.findByRole('heading', { name: 'This tune cannot be shown' })).toBeTruthy();
  });
});

describe('the form of a tune', () => {
  it('adds a tune with its tunings', async () => {
    let sent: unknown;
    mockApi({
      ...circleAnswers('host'),
      [api('POST', '/tunes')]: (body: unknown) => {
        sent = body;
        return { status: 201, body: hen };
      },
      [api('GET', one)]: ok(hen),
    });
    renderApp(at('tunes/new'));
    await userEvent.type(await screen.findByLabelText('Title'), 'Cluck Old Hen');
    await userEvent.selectOptions(screen.getByLabelText('Key'), 'A');
    await userEvent.selectOptions(screen.getByLabelText('Mode'), 'modal');
    // What is assumed follows the key: gDGCD capo 2 in A modal (score.md, usual tunings).
    expect(screen.getByRole('img', { name: 'g D G C D, capo 2' })).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Say its tuning for Fiddle' }));
    await userEvent.type(screen.getByLabelText('Fiddle tuning, first choice'), 'AEAE');
    expect(await screen.findByText('A3 E4 A4 E5, cross A')).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Accepts another as well' }));
    await userEvent.type(screen.getByLabelText('Fiddle tuning, choice 2'), 'GDAE');
    await userEvent.selectOptions(
      screen.getByLabelText('Say a tuning for another instrument'),
      screen.getByRole('option', { name: 'Guitar' }),
    );
    await userEvent.click(screen.getAllByLabelText('plays it as it stands')[1]!);
    await userEvent.click(screen.getByRole('button', { name: 'Add the tune' }));
    expect(await screen.findByRole('heading', { level: 1, name: 'Cluck Old Hen' })).toBeTruthy();
    expect(sent).toMatchObject({
      title: 'Cluck Old Hen',
      key: 'A',
      mode: 'modal',
      tunings: [
        {
          kind: 'fiddle',
          accepted: [
            { tuning: 'AEAE', capo: 0 },
            { tuning: 'GDAE', capo: 0 },
          ],
        },
        { kind: 'guitar', accepted: [{ tuning: 'any', capo: 0 }] },
      ],
    });
  });

  it('names a missing title and a tuning with too few strings at their fields, and sends nothing', async () => {
    const asked = mockApi(circleAnswers('host'));
    renderApp(at('tunes/new'));
    await userEvent.click(await screen.findByRole('button', { name: 'Add the tune' }));
    expect(await screen.findByText('A title is missing.')).toBeTruthy();
    await userEvent.type(screen.getByLabelText('Title'), 'Grey Owl');
    await userEvent.click(screen.getByRole('button', { name: 'Say its tuning for Fiddle' }));
    await userEvent.type(screen.getByLabelText('Fiddle tuning, first choice'), 'GDA');
    await userEvent.click(screen.getByRole('button', { name: 'Add the tune' }));
    await waitFor(() =>
      expect(screen.getByLabelText('Fiddle tuning, first choice').getAttribute('aria-invalid')).toBe('true'),
    );
    expect(screen.getByText('A fiddle has 4 strings; GDA names 3: G D A.')).toBeTruthy();
    expect(asked).not.toContain(api('POST', '/tunes'));
  });

  it('puts what the server refuses at its place and keeps what was typed', async () => {
    mockApi({
      ...circleAnswers('host'),
      [api('POST', '/tunes')]: () =>
        refusal(422, 'cannot-be', { 'tunings.0.accepted.0.tuning': 'This fiddle has other strings.' }),
    });
    renderApp(at('tunes/new'));
    await userEvent.type(await screen.findByLabelText('Title'), 'Grey Owl');
    await userEvent.click(screen.getByRole('button', { name: 'Say its tuning for Fiddle' }));
    await userEvent.type(screen.getByLabelText('Fiddle tuning, first choice'), 'GDAD');
    await userEvent.click(screen.getByRole('button', { name: 'Add the tune' }));
    expect(await screen.findByText('This fiddle has other strings.')).toBeTruthy();
    expect(screen.getByLabelText('Fiddle tuning, first choice').getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByLabelText<HTMLInputElement>('Title').value).toBe('Grey Owl');
  });

  it('sends of an edited tune what changed, and nothing else', async () => {
    let sent: unknown;
    mockApi({
      ...circleAnswers('cohost'),
      [api('GET', one)]: ok(hen),
      [api('PATCH', one)]: (body: unknown) => {
        sent = body;
        return { status: 200, body: { ...hen, rhythm: 'breakdown' } };
      },
    });
    renderApp(edit);
    const rhythm = await screen.findByLabelText('Rhythm');
    await userEvent.clear(rhythm);
    await userEvent.type(rhythm, 'breakdown');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('Saved.')).toBeTruthy();
    expect(sent).toEqual({ rhythm: 'breakdown' });
  });

  it('is not for a player', async () => {
    mockApi({ ...circleAnswers('player'), [api('GET', one)]: ok(hen) });
    renderApp(edit);
    expect(await screen.findByRole('heading', { level: 1, name: 'Cluck Old Hen' })).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Save' })).toBeNull();
  });
});
