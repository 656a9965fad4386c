import fc from 'fast-check';
import { decodeText, encodeText } from './abc-text';

// ABC 2.1, section 8.2 "Text strings": mnemonics, named HTML entities and fixed-width Unicode for accented
// letters; \\ \% \& for the signs themselves. The mnemonics are from memory of its table.
describe('decodeText', () => {
  it.each([
    ["Se\\'an", 'Seán'],
    ['\\`a \\^e \\"o \\~n', 'à ê ö ñ'],
    ['gar\\ccon, \\vskoda, \\Hoszi, \\ug', 'garçon, škoda, őszi, ğ'],
    ['\\AA \\aa \\/O \\/o \\AE \\ae \\OE \\oe \\ss', 'Å å Ø ø Æ æ Œ œ ß'],
    ['caf&eacute; &Agrave;&ntilde;&Uuml;&ccedil;&aring;&oslash;&szlig; R&amp;B', 'café ÀñÜçåøß R&B'],
    ['\\u00e9\\u266F', 'é♯'],
    ['50\\% \\& a \\\\ b', '50% & a \\ b'],
    // Nothing is lost where nothing was meant.
    ["\\'t \\x & &nosuch; &;", "\\'t \\x & &nosuch; &;"],
  ])('reads %j', (text, plain) => {
    expect(decodeText(text)).toBe(plain);
  });

  it('is undone by encodeText, whatever the text, also when the line is trimmed', () => {
    const text = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 30 }),
      fc.string({ unit: fc.constantFrom(...'\\%&;\'"`ucAaOoe0 \t\r\n\u00a0é') }),
    );
    fc.assert(
      fc.property(text, (any) => {
        const line = encodeText(any);
        expect(line).not.toMatch(/[\r\n]/);
        expect(decodeText(line.trim())).toBe(any);
      }),
      { numRuns: 2_000 },
    );
  });
});
