import { createSystem, defaultBaseConfig, defineConfig } from '@chakra-ui/react';
import { recipes, slotRecipes } from './recipes';

/*
 * Chakra's engine with only the recipes in use, on the colours of tokens.css: a token here is a name
 * for a CSS variable, so both lights switch without a second table. The reset and the focus ring are
 * base.css, which the phone page shares; Chakra's own reset stays off.
 */
const css = (name: string) => ({ value: `var(--${name})` });

const steps = [0.5, 1, 1.5, 2, 2.5, 3, 3.5, 4, 5, 6, 7, 8, 9, 10, 11, 12, 14, 16, 20, 24, 32, 40, 48, 64, 80];
// Chakra's own measure, a quarter rem a step, so that its documentation holds here.
const scale: Readonly<Record<string, { readonly value: string }>> = Object.fromEntries(
  [0, ...steps].map((step) => [String(step), { value: `${step * 0.25}rem` }]),
);

const colours = {
  ground: css('ground'),
  raised: css('raised'),
  ink: css('ink'),
  ink2: css('ink-2'),
  line: css('line'),
  hair: css('hair'),
  varnish: css('varnish'),
  varnishInk: css('varnish-ink'),
  spruce: css('spruce'),
  rosin: css('rosin'),
  rosinInk: css('rosin-ink'),
  rosinSoft: css('rosin-soft'),
  break: css('break'),
  // Names that Chakra's components ask for. Its own error red fails on paper (3.8:1); ours holds 6:1.
  bg: { DEFAULT: css('ground'), panel: css('raised'), muted: css('hair') },
  fg: { DEFAULT: css('ink'), muted: css('ink-2'), error: css('break') },
  border: { DEFAULT: css('line'), error: css('break') },
};

const config = defineConfig({
  preflight: false,
  cssVarsPrefix: 'pw',
  globalCss: {},
  theme: {
    breakpoints: { sm: '30rem', md: '48rem', lg: '62rem', xl: '80rem' },
    tokens: {
      fonts: { body: css('font'), heading: css('font') },
      fontSizes: {
        xs: css('text-xs'),
        sm: css('text-s'),
        md: css('text-m'),
        lg: css('text-l'),
        xl: css('text-xl'),
        '2xl': css('text-2xl'),
        '3xl': css('text-3xl'),
      },
      fontWeights: {
        normal: { value: '400' },
        semibold: { value: '600' },
        bold: { value: '700' },
        black: { value: '900' },
      },
      radii: { s: css('radius-s'), m: css('radius'), l: css('radius-l') },
      spacing: scale,
      sizes: { ...scale, full: { value: '100%' }, touch: css('touch') },
      zIndex: { popover: { value: '30' }, dialog: { value: '40' } },
      colors: colours,
    },
    recipes,
    slotRecipes,
  },
});

export const system = createSystem(defaultBaseConfig, config);
