import { fileName } from './file-name';

describe('a title as a name of a file', () => {
  it.each([
    ['Second Thursday', 'Second Thursday.pdf'],
    ['Reels: who calls?', 'Reels- who calls.pdf'],
    ['..\\..\\etc/passwd', 'etc-passwd.pdf'],
    ['  ...  ', 'pegwell.pdf'],
    ['a\tb\n c', 'a b c.pdf'],
    // What Windows refuses in names: < > : " / \ | ? *
    ['a<b>c:d"e/f\\g|h?i*j', 'a-b-c-d-e-f-g-h-i-j.pdf'],
  ])('of %j is %j', (title, name) => {
    expect(fileName(title, 'pdf')).toBe(name);
  });

  it('is never longer than file systems take (255 bytes), and never cuts a character', () => {
    const name = fileName('🎻'.repeat(200), 'pdf');
    expect(Buffer.byteLength(name)).toBeLessThanOrEqual(255);
    expect(name).toMatch(/^(?:🎻)+\.pdf$/u);
  });
});
