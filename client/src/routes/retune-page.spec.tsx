import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { renderApp } from './test-app';

const open = (query: Record<string, string>) => renderApp(`/retune?${new URLSearchParams(query).toString()}`);
const heading = () => screen.findByRole('heading', { level: 1 });
const next = () => userEvent.click(screen.getByRole('button', { name: /^Done/ }));

beforeEach(() => localStorage.clear());

describe('the retune card', () => {
  it('goes peg by peg from standard to cross A, and ends with every string', async () => {
    open({ kind: 'fiddle', from: 'GDAE', to: 'AEAE', code: 'QGQE34ES' });
    expect((await heading()).textContent).toBe('G peg (4th): up a whole step');
    expect(
      screen.getByText(/From G to A. Left side, lower peg. Its top turns toward the scroll/),
    ).toBeTruthy();
    expect(screen.getByText(/a whole step above its standard pitch/)).toBeTruthy();
    expect(screen.getByText(/The string maker's advice and a luthier come first/)).toBeTruthy();
    await next();
    expect((await heading()).textContent).toBe('D peg (3rd): up a whole step');
    expect(document.activeElement).toBe(await heading());
    await next();
    expect(screen.getByText(/See that the bridge stands upright/)).toBeTruthy();
    await next();
    expect((await heading()).textContent).toBe('There you are');
    expect(screen.getAllByRole('listitem').map((item) => item.textContent)).toEqual([
      'G peg (4th)A',
      'D peg (3rd)E',
      'A peg (2nd)A',
      'E peg (1st)E',
    ]);
    expect(screen.getByRole('button', { name: 'Back to the evening' })).toBeTruthy();
  });

  it('has the figures folded away: half steps, cents, hertz at the A of the room, pull', async () => {
    open({ kind: 'fiddle', from: 'GDAE', to: 'ADAE', a: '415' });
    await heading();
    const numbers = within(screen.getByText('In numbers').closest('details')!);
    // 415 Hz is A4, so A3 is 207.5 and G3 two equal semitones below it; 2^(2/6) is +26.0 %.
    expect(numbers.getByText('184.9 Hz to 207.5 Hz')).toBeTruthy();
    expect(numbers.getByText('+26.0 %')).toBeTruthy();
    expect(numbers.getByText('+200')).toBeTruthy();
    expect(screen.getByText('A = 415')).toBeTruthy();
  });

  it('shows a turn beyond the limits only to a player who says to go on', async () => {
    open({ kind: 'fiddle', from: 'GDAE', to: 'G3 D4 A4 G5' });
    expect((await heading()).textContent).toBe('E peg (1st): up 1½ steps');
    expect(screen.queryByText(/From E to G/)).toBeNull();
    expect(screen.getByText(/may well break and hurt an eye or a hand/)).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'I know this string. Show the turn' }));
    expect(screen.getByText(/From E to G/)).toBeTruthy();
  });

  it('warns sooner where the player has gut strings, and keeps that', async () => {
    const { unmount } = open({ kind: 'fiddle', from: 'GDAE', to: 'AEAE' });
    await heading();
    expect(screen.queryByText(/The string can break/)).toBeNull();
    await userEvent.click(screen.getByRole('checkbox', { name: /Gut strings/ }));
    expect(screen.getByText(/The string can break: face out of its line/)).toBeTruthy();
    unmount();
    open({ kind: 'fiddle', from: 'GDAE', to: 'AEAE' });
    expect(await screen.findByText(/The string can break/)).toBeTruthy();
  });

  it('is mirrored for the left hand', async () => {
    open({ kind: 'fiddle', from: 'GDAE', to: 'AEAE' });
    await heading();
    await userEvent.click(screen.getByRole('checkbox', { name: /left hand/ }));
    expect(screen.getByText(/Right side, lower peg/)).toBeTruthy();
  });

  it('takes the capo off first and says where the spike is', async () => {
    open({ kind: 'banjo', from: 'gDGBD capo 2', to: 'gCGCD capo 2' });
    expect((await heading()).textContent).toBe('Capo off. Fifth string out of its spike.');
    expect(screen.getByText('Pegs are turned without a capo.')).toBeTruthy();
    for (let step = 1; step < 5; step++) await next();
    expect((await heading()).textContent).toMatch(/^Capo on at fret 2/);
    expect(screen.queryByText('Pegs are turned without a capo.')).toBeNull();
  });

  it('says what it could not read', async () => {
    open({ kind: 'fiddle', from: 'GDAE', to: 'XYZ' });
    expect((await screen.findByRole('alert')).textContent).toMatch(
      /Where the strings are to go cannot be read/,
    );
  });
});
