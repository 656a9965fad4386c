import iconv from 'iconv-lite';
import { decode } from './decode';

const TITLES = ['Mná na hÉireann', 'Bjørn Ødegårds vals', 'Réel à quatre', 'Gånglåt från Äppelbo'];
const TEXT = TITLES.map((title, index) => `X:${index}\nT:${title}\nK:D\n`).join('\n');

const textOf = (bytes: Buffer) => {
  const decoded = decode(bytes);
  return decoded.ok ? decoded.value.text : decoded.reason;
};

describe('decode', () => {
  it.each([
    ['UTF-8', Buffer.from(TEXT), 'utf-8'],
    ['UTF-8 with a byte order mark', Buffer.from(`\ufeff${TEXT}`), 'utf-8'],
    ['UTF-16, low byte first', iconv.encode(TEXT, 'utf-16le', { addBOM: true }), 'utf-16le'],
    ['UTF-16, high byte first', iconv.encode(TEXT, 'utf-16be', { addBOM: true }), 'utf-16be'],
    ['UTF-16 that does not say so', iconv.encode(TEXT, 'utf-16le', { addBOM: false }), 'utf-16le'],
    ['the same, high byte first', iconv.encode(TEXT, 'utf-16be', { addBOM: false }), 'utf-16be'],
    ['Latin-1', Buffer.from(TEXT, 'latin1'), 'windows-1252'],
    ['Windows-1252', iconv.encode(TEXT, 'windows-1252'), 'windows-1252'],
  ])('reads %s', (_name, bytes, encoding) => {
    expect(decode(bytes)).toEqual({ ok: true, value: { text: TEXT, encoding } });
  });

  // Microsoft's code page 1252: 0x91 to 0x97 are quotes, a bullet and dashes. (Node 20's own TextDecoder
  // leaves them control characters.)
  it('reads the quotes and dashes of Windows-1252', () => {
    expect(textOf(Buffer.from('Soldier\x92s Joy \x96 \x93live\x94', 'latin1'))).toBe(
      'Soldier’s Joy – “live”',
    );
  });

  it.each([
    // ISO 8859-2: 0xAF is Ż, 0xB3 is ł.
    ['iso-8859-2', 'T:\xafywiec i Stary S\xb3up', 'T:Żywiec i Stary Słup'],
    // KOI8-R (RFC 1489).
    ['koi8-r', 'T:\xeb\xc1\xcc\xc9\xce\xcb\xc1', 'T:Калинка'],
    // Untrue or unknown: Windows-1252.
    ['utf-8', 'T:Mn\xe1', 'T:Mná'],
    ['klingon', 'T:Mn\xe1', 'T:Mná'],
    ['iso-8859-1', 'T:\x93Mn\xe1\x94', 'T:“Mná”'],
  ])('believes I:abc-charset %s where it is true (ABC 2.1, 3.1.17)', (charset, line, read) => {
    const head = `%abc-2.1\nI:abc-charset ${charset}\n`;
    expect(textOf(Buffer.from(head + line, 'latin1'))).toBe(head + read);
  });

  it('believes UTF-8 that says it is something else', () => {
    const text = '%%abc-charset iso-8859-2\nT:Mná';
    expect(textOf(Buffer.from(text))).toBe(text);
  });

  it('takes the end mark of a DOS file off', () => {
    expect(textOf(Buffer.from('T:One\r\n\x1a\r\n'))).toBe('T:One\r\n');
  });

  it('leaves one stray control character to the tune that has it', () => {
    const text = `title,key\nBad\u0001 Bell,A\n${'Good,A\n'.repeat(20)}`;
    expect(textOf(Buffer.from(text))).toBe(text);
  });

  it.each([
    ['nothing', Buffer.alloc(0), 'This file is empty.'],
    ['white space', Buffer.from('\ufeff \r\n\n'), 'This file is empty.'],
    // The first bytes of a PNG (ISO/IEC 15948).
    ['a picture', Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'), 'This file is not text.'],
    ['half of UTF-16', Buffer.from('\ufeffti\u0000tle', 'utf16le'), 'This file is not text.'],
    ['control characters', Buffer.from([0x41, 0xe9, 0x02, 0x42]), 'This file is not text.'],
    // APPNOTE.TXT, 4.3.7: the local file header.
    ['an archive', Buffer.from('504b030414000000', 'hex'), /^This is a ZIP archive or a spreadsheet/],
    ['a PDF', Buffer.from('%PDF-1.7\n'), /^This is a PDF/],
  ])('refuses %s', (_name, bytes, reason) => {
    expect(decode(bytes)).toEqual({
      ok: false,
      reason: typeof reason === 'string' ? reason : expect.stringMatching(reason),
    });
  });
});
