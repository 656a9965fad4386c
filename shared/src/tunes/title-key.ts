/** Every sign that people type for an apostrophe, straight, curled or borrowed from an accent. */
const APOSTROPHES = /['`´‘’‚‛′ʹʻʼʽˈ＇]/g;
/** Letters that Unicode does not take apart into a letter and its accent. */
const STROKED: Readonly<Record<string, string>> = {
  ø: 'o',
  ł: 'l',
  đ: 'd',
  ð: 'd',
  ħ: 'h',
  ŧ: 't',
  ı: 'i',
  ß: 'ss',
  æ: 'ae',
  œ: 'oe',
  þ: 'th',
  ς: 'σ',
};
const STROKED_LETTER = new RegExp(`[${Object.keys(STROKED).join('')}]`, 'g');

/**
 * What titles are compared, searched and sorted by: without case, accents, apostrophes and extra white space.
 * Articles and other punctuation count.
 * @example titleKey("  Soldier’s   Joy ") // 'soldiers joy'
 * @example titleKey('Mná na hÉireann') // 'mna na heireann'
 */
export function titleKey(title: string): string {
  return (
    title
      // Before taking apart: a bare acute accent would turn into a space.
      .replace(APOSTROPHES, '')
      .toLowerCase()
      .normalize('NFKD')
      .replace(/\p{M}|\p{Cf}/gu, '')
      .toLowerCase()
      .replace(STROKED_LETTER, (letter) => STROKED[letter] ?? letter)
      .replace(/[\s\p{Cc}]+/gu, ' ')
      .trim()
  );
}
