import { decodeUpload } from './decode-upload';

describe('decodeUpload', () => {
  it('reads UTF-8, with or without a byte order mark', () => {
    expect(decodeUpload(Buffer.from('\ufefftitle,é'))).toEqual({ ok: true, value: 'title,é' });
    expect(decodeUpload(Buffer.from('title,é'))).toEqual({ ok: true, value: 'title,é' });
  });

  it.each([
    [Buffer.alloc(0), 'This file is empty.'],
    [Buffer.from('\ufeff \r\n\n'), 'This file is empty.'],
    // The first bytes of a PNG (ISO/IEC 15948).
    [Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'), 'This file is not text.'],
    [
      Buffer.from('a\nb\nMn\u00e1', 'latin1'),
      /^This file is not UTF-8 text: line 3 cannot be read\. Save it as UTF-8/,
    ],
    [Buffer.from('\ufefftitle', 'utf16le'), /^This file is UTF-16 text\. Save it as UTF-8/],
  ])('refuses %s', (bytes, reason) => {
    expect(decodeUpload(bytes)).toEqual({
      ok: false,
      reason: typeof reason === 'string' ? reason : expect.stringMatching(reason),
    });
  });
});
