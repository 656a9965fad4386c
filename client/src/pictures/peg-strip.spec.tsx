import { builtInKind, standardPitches } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { PegStrip } from './peg-strip';

const kindOf = (id: string) => {
  const kind = builtInKind(id);
  if (!kind) throw new Error(`no kind ${id}`);
  return kind;
};

const pitches = (id: string, text: string) => {
  const parsed = parseTuning(kindOf(id), text);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value.pitches;
};

const strip = (id: string, from: string, to: string, more = {}) =>
  render(<PegStrip kind={kindOf(id)} from={pitches(id, from)} to={pitches(id, to)} {...more} />);

const columns = (container: HTMLElement) => [...container.querySelectorAll('[role=img] > *')];

describe('PegStrip', () => {
  // The retune of score.md's first worked example, 1 to 2: G up 2, D up 2, the others stay.
  it('fills the pegs that turn, in string order, under their standing names', () => {
    const { container } = strip('fiddle', 'GDAE', 'AEAE');
    expect(columns(container).map((column) => column.textContent)).toEqual(['GA', 'DE', 'A', 'E']);
    expect(columns(container).map((column) => column.getAttribute('data-turned'))).toEqual([
      'up',
      'up',
      null,
      null,
    ]);
  });

  it('says every turn in the words used everywhere', () => {
    strip('fiddle', 'GDAE', 'AEAE');
    expect(
      screen.getByRole('img', {
        name: 'G peg (4th): up a whole step, from G to A; D peg (3rd): up a whole step, from D to E',
      }),
    ).toBeTruthy();
  });

  it('keeps the name of a peg that has been turned before', () => {
    const { container } = strip('fiddle', 'AEAE', 'GDAE');
    expect(columns(container).map((column) => column.textContent)).toEqual(['GG', 'DD', 'A', 'E']);
  });

  it('draws both pegs of a doubled course', () => {
    const { container } = strip('mandolin', 'GDAE', 'GDAD');
    const heads = columns(container).map(
      (column) => column.querySelectorAll('svg[viewBox="0 0 24 31"]').length,
    );
    expect(heads).toEqual([2, 2, 2, 2]);
  });

  it('puts the number of semitones under a large peg', () => {
    const { container } = strip('fiddle', 'GDAE', 'GDAD', { size: 'large' });
    expect(columns(container).at(-1)?.textContent).toBe('ED−2');
  });

  it('is a thin line where nothing turns, or pegs at rest where asked', () => {
    const { container, rerender } = strip('fiddle', 'GDAE', 'GDAE');
    expect(screen.getByRole('img', { name: 'Nothing to turn' }).textContent).toBe('');
    const kind = kindOf('fiddle');
    rerender(<PegStrip kind={kind} from={null} to={standardPitches(kind)} whenStill="pegs" />);
    expect(columns(container)).toHaveLength(4);
  });

  it('is passed over by screen readers where the words stand beside it', () => {
    strip('fiddle', 'GDAE', 'AEAE', { wordsBeside: true });
    expect(screen.queryByRole('img')).toBeNull();
  });
});
