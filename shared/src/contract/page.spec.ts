import { describe, expect, it } from 'vitest';
import { lineSchema, textSchema } from './page';

const name = lineSchema(80, 'A name');
const read = (text: string) => name.safeParse(text);

describe('one line of text', () => {
  // Code points and what they do: the Unicode character database; the tricks: Unicode Technical Report 36.
  it.each([
    ['a zero-width space', 'Ad\u200ba'],
    ['a byte order mark', '\ufeffAda'],
    ['a word joiner', 'A\u2060da'],
    ['a soft hyphen', 'A\u00adda'],
    ['marks of direction', '\u200eA\u200fda\u061c'],
    ['joiners between Latin letters', 'A\u200dd\u200c\u200da'],
    ['tags that are no flag', 'Ada\u{e0041}\u{e007f}'],
    ['white space around it', '  Ada\u00a0'],
  ])('loses %s', (_, text) => {
    expect(read(text).data).toBe('Ada');
  });

  it('is one text however its accents were typed (Unicode Standard Annex 15)', () => {
    expect(read('Mna\u0301').data).toBe(read('Mn\u00e1').data);
  });

  it.each([
    ['a family, by joiners', '👩‍👩‍👧'],
    ['a flag, by tags', '🏴\u{e0067}\u{e0062}\u{e0073}\u{e0063}\u{e0074}\u{e007f}'],
    ['a Persian word, by a non-joiner', 'می‌خواهم'],
    ['a Hindi word, by a joiner', 'क्‍ष'],
    ['Hebrew', 'שלום'],
    ['Vietnamese', 'Nguyễn Thị'],
  ])('keeps %s', (_, text) => {
    expect(read(text).data).toBe(text.normalize('NFC'));
  });

  it.each([
    ['a NUL', 'A\u0000da'],
    ['a line break', 'A\nda'],
    ['half of a pair', 'A\ud800da'],
    ['an override of direction', 'Ada \u202efdp.exe'],
    ['an isolate', 'Ada \u2066x\u2069'],
    ['a line separator', 'Ada\u2028'],
    ['a tower of marks', `A${'\u0301\u0302\u0303\u0304'.repeat(3)}da`],
  ])('refuses %s with a sentence', (_, text) => {
    const { success, error } = read(text);
    expect(success).toBe(false);
    expect(error?.issues[0]?.message).toMatch(/^A name has .+\.$/);
  });

  it('is missing where there is nothing to see', () => {
    expect(read('\u200b \u2060\ufeff').error?.issues[0]?.message).toBe('A name is missing.');
  });
});

it('several lines may break, and no more', () => {
  const notes = textSchema(100, 'Notes');
  expect(notes.safeParse('one\r\ntwo\tthree').success).toBe(true);
  expect(notes.safeParse('one \u202e two').success).toBe(false);
});
