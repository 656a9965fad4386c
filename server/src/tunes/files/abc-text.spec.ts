import fc from 'fast-check';
import { decodeText, encodeText } from './abc-text';

// ABC 2.1, section 14.1 "Supported accents & ligatures": character, mnemonic, named entity.
const ACCENTS = `
À \\\`A &Agrave; | à \\\`a &agrave; | È \\\`E &Egrave; | ì \\\`i &igrave; | ò \\\`o &ograve; | Ù \\\`U &Ugrave;
Á \\'A &Aacute; | é \\'e &eacute; | Í \\'I &Iacute; | ó \\'o &oacute; | Ú \\'U &Uacute; | ý \\'y &yacute;
Â \\^A &Acirc; | ê \\^e &ecirc; | Î \\^I &Icirc; | ô \\^o &ocirc; | Û \\^U &Ucirc; | ŷ \\^y &ycirc;
Ã \\~A &Atilde; | ñ \\~n &ntilde; | Õ \\~O &Otilde;
Ä \\"A &Auml; | ë \\"e &euml; | Ï \\"I &Iuml; | ö \\"o &ouml; | Ü \\"U &Uuml; | Ÿ \\"Y &Yuml; | ÿ \\"y &yuml;
Ç \\cC &Ccedil; | ç \\cc &ccedil; | Å \\AA &Aring; | å \\aa &aring; | Ø \\/O &Oslash; | ø \\/o &oslash;
Ă \\uA &Abreve; | ă \\ua &abreve; | Ĕ \\uE \\u0114 | ĕ \\ue \\u0115
Š \\vS &Scaron; | š \\vs &scaron; | Ž \\vZ &Zcaron; | ž \\vz &zcaron;
Ő \\HO \\u0150 | ő \\Ho \\u0151 | Ű \\HU \\u0170 | ű \\Hu \\u0171
Æ \\AE &AElig; | æ \\ae &aelig; | Œ \\OE &OElig; | œ \\oe &oelig; | ß \\ss &szlig;
Ð \\DH &ETH; | ð \\dh &eth; | Þ \\TH &THORN; | þ \\th &thorn;`
  .split(/[|\n]/)
  .map((row) => row.trim().split(' '))
  .filter((row) => row.length === 3);

describe('decodeText', () => {
  it.each(ACCENTS)('reads %s, written %s or %s (14.1)', (character, mnemonic, other) => {
    expect(decodeText(`x${mnemonic}x${other}x`)).toBe(`x${character}x${character}x`);
  });

  // Section 8.2 "Text strings".
  it.each([
    ["Se\\'an", 'Seán'],
    // Fixed-width Unicode; four characters that are no number make a breve.
    ['\\u00e9 \\u266F \\U000000e9 \\U0001F3BB \\uabe', 'é ♯ é 🎻 ăbe'],
    ['50\\% G\\&T a \\\\ b', '50% G&T a \\ b'],
    ['gin & tonic &copy; &amp; &quot;', 'gin & tonic © & "'],
    // The mnemonics of abc 2.0 (14.2).
    ['\\,c \\oa', 'ç å'],
    // TeX's braces and HTML's numbers are no part of the standard, but of files.
    ['Se\\\'{a}n \\"{u}ber', 'Seán über'],
    ['Caf&#233; &#xe9;tude &rsquo;tis &#128020;', 'Café étude ’tis 🐔'],
    // Nothing is lost where nothing was meant.
    ["\\'t \\x & &nosuch; &; \\U99999999", "\\'t \\x & &nosuch; &; \\U99999999"],
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
