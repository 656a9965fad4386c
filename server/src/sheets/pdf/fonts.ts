import { dirname, join } from 'node:path';
import { openSync, type Font } from 'fontkit';
import type { TFontDictionary } from 'pdfmake/interfaces';
import { HEAVY, TEXT } from './ink';

/** Source Sans 3 whole: the files that pages use are split by script and would lose letters. */
const FOLDER = dirname(require.resolve('@expo-google-fonts/source-sans-3/package.json'));
const fontFile = (weight: string) => join(FOLDER, weight, `SourceSans3_${weight}.ttf`);

const REGULAR = fontFile('400Regular');
const BOLD = fontFile('700Bold');
const BLACK = fontFile('900Black');

export const FONT_FILES: readonly string[] = [REGULAR, BOLD, BLACK];
export const FONTS: TFontDictionary = {
  [TEXT]: { normal: REGULAR, bold: BOLD },
  [HEAVY]: { normal: BLACK, bold: BLACK },
};

let known: ReadonlySet<number> | null = null;

/** Code points that the typeface draws. All its weights draw the same ones. */
function drawn(): ReadonlySet<number> {
  // Not a collection: a .ttf holds one font.
  known ??= new Set((openSync(REGULAR) as Font).characterSet);
  return known;
}

/** Emoji with all that belongs to them: skin, flag, joiner, the marks that ask for a picture or a key cap. */
const EMOJI =
  /(?:\p{Extended_Pictographic}|\p{Emoji_Modifier}|\p{Regional_Indicator}|\u200d|\ufe0e|\ufe0f|\u20e3)+/gu;
const SPELLED: Readonly<Record<string, string>> = { '♯': '#', '♭': 'b', '♮': '' };

/**
 * Text as the typeface can draw it: accents put together, emoji left out, and a box for every other letter that
 * it lacks, so that nobody takes a title for whole that is not.
 * @example printable('Fire 🔥 in B♭') // 'Fire in Bb'
 */
export function printable(text: string): string {
  const plain = text
    .normalize('NFC')
    .replace(/[♯♭♮]/g, (sign) => SPELLED[sign] ?? '')
    .replace(EMOJI, (found) => [...found].filter((letter) => drawn().has(codePoint(letter))).join(''))
    .replace(/\s+/g, ' ')
    .trim();
  return [...plain].map((letter) => (drawn().has(codePoint(letter)) ? letter : '□')).join('');
}

function codePoint(letter: string): number {
  return letter.codePointAt(0) ?? 0;
}
