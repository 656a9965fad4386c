import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { pictured } from './lanes-fixtures';
import { StringLanes } from './string-lanes';

/** score.md, worked example 2: five fiddles, sets of 3 and 2. */
const example2 = () =>
  pictured({ fiddle: 5 }, [
    ['GDAE', 'GDAE', 'ADAE'],
    ['AEAE', 'AEAE'],
  ]);

const prices = (container: HTMLElement, kind: 'stopPrice' | 'offPrice') =>
  [...container.querySelectorAll(`text[class*=${kind}]`)].map((text) => text.textContent);

afterEach(() => vi.restoreAllMocks());

describe('StringLanes', () => {
  it('marks every stop with its price over all chairs, and those off the clock as outlines', () => {
    const { container } = render(<StringLanes {...example2()} />);
    // pegChanges 10: G on five fiddles on the clock, D on five in the break.
    expect(prices(container, 'stopPrice')).toEqual(['5']);
    expect(prices(container, 'offPrice')).toEqual(['5']);
    expect(screen.getByText('String lanes. 5 tunes, 10 peg changes, 1 stop.')).toBeTruthy();
  });

  it('marks each turned string with a direction and a number', () => {
    const { container } = render(<StringLanes {...pictured({ fiddle: 1 }, [['GDAE', 'AEAC#', 'GDAE']])} />);
    const turns = [...container.querySelectorAll('[data-turn]')].map((mark) =>
      mark.getAttribute('data-turn'),
    );
    expect(turns).toEqual(['2', '-2', '2', '-2', '-3', '3']);
  });

  it('tells the same in sentences', () => {
    render(<StringLanes {...example2()} />);
    expect(screen.getAllByRole('listitem').map((item) => item.textContent)).toEqual([
      'Before 3, Tune 3: 5 fiddles: G peg (4th): up a whole step, from G to A. 5 peg changes.',
      'Before 4, Tune 4: 5 fiddles: D peg (3rd): up a whole step, from D to E. 5 peg changes, off the clock.',
    ]);
  });

  it('shows pegs turned before the first tune', () => {
    const { container } = render(<StringLanes {...pictured({ fiddle: 1 }, [['AEAE', 'AEAE']])} />);
    expect(prices(container, 'offPrice')).toEqual(['2']);
    expect(screen.getByRole('listitem').textContent).toMatch(/^Before 1, .* 2 peg changes, off the clock\.$/);
  });

  it('has a group of lanes per kind, and a line for a capo that moves', () => {
    const evening = pictured({ fiddle: 5, banjo: 1 }, [['AEAE|gDGBD capo 2', 'GDAE|gDGBD']]);
    const { container } = render(<StringLanes {...evening} />);
    expect(screen.getByText('5 fiddles')).toBeTruthy();
    expect(screen.getByText('Banjo')).toBeTruthy();
    expect(screen.getByText('no capo')).toBeTruthy();
    expect(container.querySelectorAll('path[class*=lane]')).toHaveLength(9);
  });

  it.each([
    [{ fiddle: 5, 'tenor-banjo': 12 }, ['ADAE|CGDA', 'GDAE|CGDB']],
    [{ dulcimer: 3, 'tenor-banjo': 4, fiddle: 5 }, ['D3 A3 A3|CGDA|ADAE', 'D3 A3 D4|CGDB|GDAE']],
  ])('keeps "off the clock" clear of the names of %o, which may reach into the gap', (room, turned) => {
    const { container } = render(<StringLanes {...pictured(room, [turned, turned])} />);
    const names = [...container.querySelectorAll('text[class*=group]')].map((name) =>
      Number(name.getAttribute('y')),
    );
    expect(names).toHaveLength(Object.keys(room).length);
    const words = [...container.querySelectorAll('text[class*=offWords]')];
    expect(words.map((each) => each.textContent)).toEqual(['off the clock', 'off the clock']);
    for (const word of words) {
      const middle = Number(/translate\(\S+ (\S+)\)/.exec(word.getAttribute('transform') ?? '')?.[1]);
      // Written upwards, 12 px high letters, about 78 px long; a name stands 12 px above its line.
      const clear = names.every((y) => y < middle - 39 || y - 12 > middle + 39);
      expect({ names, middle, clear }).toEqual({ names, middle, clear: true });
    }
  });

  it('shows one instrument at a time where the evening takes several rows', async () => {
    vi.spyOn(Element.prototype, 'clientWidth', 'get').mockReturnValue(358);
    const cells = Array.from({ length: 12 }, () => 'AEAE|gDGBD');
    const { container } = render(<StringLanes {...pictured({ fiddle: 5, banjo: 2 }, [cells])} />);
    const choice = within(screen.getByRole('group', { name: 'Lanes of' }));
    expect(container.querySelectorAll('svg path[class*=lane]')).toHaveLength(2 * 4);
    await userEvent.click(choice.getByRole('button', { name: '2 banjos' }));
    expect(container.querySelectorAll('svg path[class*=lane]')).toHaveLength(2 * 5);
    expect(choice.getByRole('button', { name: '2 banjos' }).getAttribute('aria-pressed')).toBe('true');
  });

  it('draws nothing, and says so, for an evening without tunes', () => {
    const { container } = render(<StringLanes {...pictured({ fiddle: 1 }, [[]])} />);
    expect(container.querySelector('svg')).toBeNull();
    expect(screen.getByText('String lanes. 0 tunes, nothing to turn.')).toBeTruthy();
  });
});
