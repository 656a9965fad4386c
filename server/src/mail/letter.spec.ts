import { headerLine, html, plainText, type Letter } from './letter';

const letter: Letter = {
  to: 'ada@example.org',
  subject: 'Confirm <your> address',
  paragraphs: ['Somebody called "Ada" <script>alert(1)</script> & co.', "It's for you."],
  link: { words: 'Confirm', url: 'https://pegwell.example/confirm#a"b&c' },
  foot: 'Not you?',
};

describe('a letter', () => {
  it('says the same in plain text, the address in full', () => {
    expect(plainText(letter)).toBe(
      `Somebody called "Ada" <script>alert(1)</script> & co.\n\nIt's for you.\n\nConfirm:\nhttps://pegwell.example/confirm#a"b&c\n\nNot you?\n`,
    );
  });

  it('has no markup in HTML that was not ours', () => {
    const written = html(letter);
    expect(written).not.toContain('<script');
    expect(written).toContain('&lt;script&gt;alert(1)&lt;/script&gt; &amp; co.');
    expect(written).toContain('href="https://pegwell.example/confirm#a&quot;b&amp;c"');
    expect(written).toContain('<title>Confirm &lt;your&gt; address</title>');
  });

  it.each([
    ['one\r\nBcc: all@example.org', 'one Bcc: all@example.org'],
    ['one\u2028two\u0000', 'one two'],
    ['plain', 'plain'],
  ])('keeps %j on one line', (text, line) => expect(headerLine(text)).toBe(line));
});
