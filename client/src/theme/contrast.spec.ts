import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

// The test runner leaves style sheets empty, so the file is read as it stands; tests start in client/.
const css = readFileSync('src/theme/tokens.css', 'utf8');

/** The hexadecimal colours of one light, by token. */
function tokens(light: 'day' | 'lamp'): Readonly<Record<string, string>> {
  const block = css.slice(css.indexOf(`[data-light='${light}']`));
  const body = block.slice(block.indexOf('{'), block.indexOf('}'));
  const found = [...body.matchAll(/--([\w-]+): (#[0-9a-f]{6})/g)];
  return Object.fromEntries(found.map((match) => [match[1] ?? '', match[2] ?? ''] as const));
}

/** WCAG 2.2, relative luminance of an sRGB colour. */
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const part = parseInt(hex.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

/** WCAG 2.2, contrast ratio: 1 to 21. */
function contrast(one: string, other: string): number {
  const [dark = 0, bright = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (bright + 0.05) / (dark + 0.05);
}

describe.each(['day', 'lamp'] as const)('in %s light', (light) => {
  const colours = tokens(light);
  const ratio = (text: string, ground: string) => contrast(colours[text] ?? '', colours[ground] ?? '');

  it.each([
    ['ink', 'ground'],
    ['ink', 'raised'],
    ['ink', 'hair'],
    ['ink-2', 'ground'],
    ['ink-2', 'raised'],
    ['ink-2', 'hair'],
    ['varnish', 'ground'],
    ['varnish', 'raised'],
    ['varnish-ink', 'varnish'],
    ['varnish-ink', 'varnish-deep'],
    ['spruce', 'ground'],
    ['spruce', 'raised'],
    ['rosin-ink', 'ground'],
    ['rosin-ink', 'raised'],
    ['rosin-ink', 'rosin-soft'],
    ['on-rosin', 'rosin'],
    ['break', 'ground'],
    ['break', 'raised'],
  ])('%s on %s can be read: 4.5 to 1 (WCAG 1.4.3)', (text, ground) => {
    expect(ratio(text, ground)).toBeGreaterThanOrEqual(4.5);
  });

  it('edges that can be pressed or typed into stand out: 3 to 1 (WCAG 1.4.11)', () => {
    expect(ratio('ink-2', 'ground')).toBeGreaterThanOrEqual(3);
    expect(ratio('ink-2', 'raised')).toBeGreaterThanOrEqual(3);
  });
});

it('the follow page’s main text in lamp light holds 7 to 1 (WCAG 1.4.6)', () => {
  const { ink = '', ground = '', spruce = '', 'rosin-ink': rosin = '' } = tokens('lamp');
  for (const text of [ink, spruce, rosin]) expect(contrast(text, ground)).toBeGreaterThanOrEqual(7);
});
