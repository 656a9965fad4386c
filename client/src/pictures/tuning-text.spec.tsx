import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { TuningText, spokenTuning } from './tuning-text';

describe('a tuning for a voice', () => {
  it.each([
    ['GDAE', 'G D A E'],
    ['AEAC#', 'A E A C sharp'],
    ['gDGBD', 'g D G B D'],
    ['gDGBD capo 2', 'g D G B D, capo 2'],
    ['FBbFBb', 'F B flat F B flat'],
    ['A3 E4 A4 C#5', 'A 3, E 4, A 4, C sharp 5'],
    ['any', 'any'],
  ])('reads %s as %s', (text, spoken) => {
    expect(spokenTuning(text)).toBe(spoken);
  });
});

describe('TuningText', () => {
  it('shows the tuning as it is written and is read letter by letter', () => {
    render(<TuningText text="gDGBD capo 2" />);
    const tuning = screen.getByRole('img', { name: 'g D G B D, capo 2' });
    expect(tuning.textContent).toBe('gDGBD capo 2');
  });
});
