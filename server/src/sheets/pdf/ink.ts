/** The day colours of the theme, on white paper. Everything is told by words or shape too: it prints grey. */
export const INK = '#1B1510';
export const INK_2 = '#6A5A4C';
export const LINE = '#DACDB9';
export const ROSIN = '#C98A1A';
export const ROSIN_INK = '#7A4C00';
export const ROSIN_PAPER = '#FBF3DF';
export const BREAK = '#A8231B';

/** Families that pdfmake knows by these names: each weight is a font file of its own. */
export const TEXT = 'Text';
/** Weight 900, for headings, titles of tunes and tunings. */
export const HEAVY = 'Heavy';
