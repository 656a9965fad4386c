import { contentDisposition } from './content-disposition';

/** attr-char of RFC 8187 section 3.2.1, and percent-encoded octets. */
const EXT_VALUE = /^UTF-8''(?:[A-Za-z0-9!#$&+.^_`|~-]|%[0-9A-F]{2})*$/;

describe('contentDisposition', () => {
  it('names the file twice: plain, and as RFC 8187 has it (RFC 6266 section 5)', () => {
    expect(contentDisposition('Set sheet.pdf')).toBe(
      `attachment; filename="Set sheet.pdf"; filename*=UTF-8''Set%20sheet.pdf`,
    );
    expect(contentDisposition('a.ics', 'inline')).toMatch(/^inline; /);
  });

  it('encodes the euro example of RFC 6266 section 5 as the RFC does', () => {
    expect(contentDisposition('€ rates')).toBe(
      `attachment; filename="_ rates"; filename*=UTF-8''%E2%82%AC%20rates`,
    );
  });

  it.each([
    "O'Neill (1903)*.csv",
    'Ceol na hÉireann.abc',
    '50% "off"; x=y',
    'a\r\nSet-Cookie: b',
    '🎻',
    '\ud800',
  ])('gives %j a header of nothing but what may stand in one', (name) => {
    const header = contentDisposition(name);
    expect(header).toMatch(/^[\u0020-\u007e]+$/);
    const match = /^attachment; filename="([^"\\%]*)"; filename\*=(.*)$/.exec(header);
    expect(match?.[2]).toMatch(EXT_VALUE);
  });

  it('can be read back', () => {
    const name = "Mná (na) h'Éireann*.csv";
    const encoded = /filename\*=UTF-8''(.*)$/.exec(contentDisposition(name))?.[1] ?? '';
    expect(decodeURIComponent(encoded)).toBe(name);
  });

  it('lets no name reach another folder', () => {
    expect(contentDisposition('../up\\and/away.csv')).not.toMatch(/[/\\]/);
  });
});
