/**
 * ABC text strings, 2.1 sections 8.2 and 14.1: mnemonics for accented letters (`\,` and `\o` are those of 2.0),
 * HTML's names of them, and Unicode by number.
 */
const MARKS: Readonly<Record<string, string>> = {
  '`': '\u0300',
  "'": '\u0301',
  '^': '\u0302',
  '~': '\u0303',
  '"': '\u0308',
  u: '\u0306',
  v: '\u030c',
  H: '\u030b',
  c: '\u0327',
  ',': '\u0327',
  o: '\u030a',
};
const ENTITY_MARKS: Readonly<Record<string, string>> = {
  grave: '\u0300',
  acute: '\u0301',
  circ: '\u0302',
  tilde: '\u0303',
  uml: '\u0308',
  breve: '\u0306',
  caron: '\u030c',
  ring: '\u030a',
  cedil: '\u0327',
};
/** Letters that are no letter with a mark. */
const LIGATURES: Readonly<Record<string, string>> = {
  '/O': 'Ø',
  '/o': 'ø',
  AA: 'Å',
  aa: 'å',
  AE: 'Æ',
  ae: 'æ',
  OE: 'Œ',
  oe: 'œ',
  ss: 'ß',
  DH: 'Ð',
  dh: 'ð',
  TH: 'Þ',
  th: 'þ',
};
const ENTITIES: Readonly<Record<string, string>> = {
  amp: '&',
  lt: '<',
  gt: '>',
  quot: '"',
  apos: "'",
  copy: '©',
  nbsp: '\u00a0',
  lsquo: '‘',
  rsquo: '’',
  ldquo: '“',
  rdquo: '”',
  ndash: '–',
  mdash: '—',
  hellip: '…',
  Oslash: 'Ø',
  oslash: 'ø',
  AElig: 'Æ',
  aelig: 'æ',
  OElig: 'Œ',
  oelig: 'œ',
  szlig: 'ß',
  ETH: 'Ð',
  eth: 'ð',
  THORN: 'Þ',
  thorn: 'þ',
};

const ESCAPE =
  /\\(?:u([0-9A-Fa-f]{4})|U([0-9A-Fa-f]{8})|([\\%&])|(\/[Oo]|AA|aa|AE|ae|OE|oe|ss|DH|dh|TH|th)|([`'^~"uvHc,o])(?:([A-Za-z])|\{([A-Za-z])\}))|&(?:([A-Za-z]{2,10})|#(\d{1,7})|#[xX]([0-9A-Fa-f]{1,6}));/g;

/**
 * Beyond the standard: TeX's braces (`\\'{e}`) and HTML's numbers (`&#233;`), which other programs leave behind.
 * @example decodeText("Se\\'an \\% caf&eacute;") // 'Seán % café'
 */
export function decodeText(text: string): string {
  return text.replace(
    ESCAPE,
    (
      whole,
      code?: string,
      longCode?: string,
      sign?: string,
      ligature?: string,
      mark?: string,
      bare?: string,
      braced?: string,
      entity?: string,
      decimal?: string,
      hex?: string,
    ) => {
      if (code !== undefined) return String.fromCharCode(parseInt(code, 16));
      if (longCode !== undefined) return characterOf(parseInt(longCode, 16)) ?? whole;
      if (sign !== undefined) return sign;
      if (ligature !== undefined) return LIGATURES[ligature] ?? whole;
      const letter = bare ?? braced;
      if (mark !== undefined && letter !== undefined) return compose(letter, MARKS[mark]) ?? whole;
      if (decimal !== undefined) return characterOf(Number(decimal)) ?? whole;
      if (hex !== undefined) return characterOf(parseInt(hex, 16)) ?? whole;
      return entity === undefined ? whole : (readEntity(entity) ?? whole);
    },
  );
}

function characterOf(code: number): string | null {
  return code <= 0x10ffff ? String.fromCodePoint(code) : null;
}

/** One character, or null where there is no such letter: then nothing was meant. */
function compose(letter: string, mark: string | undefined): string | null {
  const composed = (letter + (mark ?? '')).normalize('NFC');
  return composed.length === 1 && composed !== letter ? composed : null;
}

function readEntity(name: string): string | null {
  return Object.hasOwn(ENTITIES, name)
    ? (ENTITIES[name] ?? null)
    : compose(name.charAt(0), ENTITY_MARKS[name.slice(1)]);
}

/** One line that `decodeText` reads back, after any trimming, as exactly this. */
export function encodeText(text: string): string {
  const start = text.length - text.trimStart().length;
  const end = Math.max(start, text.trimEnd().length);
  const inner = text.slice(start, end).replace(/[\\%&]/g, '\\$&');
  return codes(text.slice(0, start)) + inner.replace(/[\r\n]/g, codes) + codes(text.slice(end));
}

function codes(characters: string): string {
  return characters.replace(
    /[^]/g,
    (character) => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}
