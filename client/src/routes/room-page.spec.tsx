import { screen, waitFor, within } from '@testing-library/react';
import jsQR from 'jsqr';
import { describe, expect, it } from 'vitest';
import { follow, tune } from '../features/live/follow-fixtures';
import { mockApi } from '../lib/mock-api';
import { renderApp } from './test-app';

/** Cluck Old Hen is now: the fiddle turns its D peg, the banjo stays. */
const room = (kind: string | null) =>
  kind === 'banjo'
    ? follow({
        kind: 'banjo',
        now: {
          ...tune(6, 'Cluck Old Hen', 'gDGCD capo 2', 'gDGCD capo 2', { kind: 'banjo' }),
          phase: 'tuning',
        },
        next: tune(7, 'June Apple', 'gDGBD capo 2', 'gDGCD capo 2', { kind: 'banjo' }),
      })
    : follow({
        now: { ...tune(6, 'Cluck Old Hen', 'AEAE', 'ADAE', { mode: 'modal' }), phase: 'tuning' },
        next: tune(7, 'June Apple', 'AEAE'),
      });

function open() {
  mockApi({
    'GET /api/follow/QGQE34ES': (_, url) => ({ status: 200, body: room(url.searchParams.get('kind')) }),
  });
  renderApp('/f/QGQE34ES/room');
}

describe('the screen for the room', () => {
  it('shows all kinds that retune: their tuning, and what to turn', async () => {
    open();
    expect(await screen.findByRole('heading', { level: 1, name: 'Cluck Old Hen' })).toBeTruthy();
    const of = (name: string) => within(screen.getByRole('heading', { level: 2, name }).closest('li')!);
    expect(of('Fiddle').getByRole('img', { name: 'Fiddle in A E A E' })).toBeTruthy();
    expect(of('Fiddle').getByText('Retune 1 peg now')).toBeTruthy();
    expect(of('Fiddle').getByText('D peg up a whole step, to E')).toBeTruthy();
    expect(of('Banjo').getByRole('img', { name: 'Banjo in g D G C D, capo 2' })).toBeTruthy();
    expect(of('Banjo').getByText('Stay as you are')).toBeTruthy();
    const next = within(screen.getByRole('region', { name: 'Next' }));
    expect(next.getByText('Banjo: 1 peg')).toBeTruthy();
    expect(next.getByText('Fiddle: stay')).toBeTruthy();
    expect(screen.getByText(/The string maker's advice and a luthier come first/)).toBeTruthy();
  });

  it('shows a code that a camera reads as the address to follow', async () => {
    open();
    const code = await screen.findByRole('img', { name: /^Code to scan/ });
    await waitFor(() => expect(code.querySelector('path')).not.toBeNull());
    const read = scan(code);
    expect(read).toBe('https://tunes.example.org/f/QGQE34ES');
  });
});

/** Draws the code, four pixels a module, and reads it as a camera's software does (jsqr). */
function scan(svg: Element): string | undefined {
  const [left = 0, , side = 0] = svg.getAttribute('viewBox')!.split(' ').map(Number);
  const scale = 4;
  const pixels = new Uint8ClampedArray((side * scale) ** 2 * 4).fill(255);
  for (const [, x, y] of svg
    .querySelector('path')!
    .getAttribute('d')!
    .matchAll(/M(\d+) (\d+)h1v1h-1z/g)) {
    for (let row = 0; row < scale; row++) {
      for (let column = 0; column < scale; column++) {
        const at = ((Number(y) - left) * scale + row) * side * scale + (Number(x) - left) * scale + column;
        pixels.fill(0, at * 4, at * 4 + 3);
      }
    }
  }
  return jsQR(pixels, side * scale, side * scale)?.data;
}
