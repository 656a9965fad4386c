import { EnvError, parseEnv } from './env';

const DATABASE_URL = 'postgresql://somebody@127.0.0.1:5432/pegwell';
const secret = 'thirty-two random characters, or more';

describe('the configuration', () => {
  it('has defaults for everything but the database', () => {
    expect(parseEnv({ DATABASE_URL })).toMatchObject({
      PORT: 3001,
      PEGWELL_HOST: '127.0.0.1',
      PEGWELL_URL: 'http://127.0.0.1:3001',
      PEGWELL_DEMO: false,
      production: false,
    });
  });

  it('takes an empty variable for an absent one', () => {
    expect(parseEnv({ DATABASE_URL, PORT: '', PEGWELL_URL: '' }).PORT).toBe(3001);
  });

  it.each([
    [{}, /DATABASE_URL/],
    [{ DATABASE_URL: 'mysql://x' }, /DATABASE_URL begins with postgresql/],
    [{ DATABASE_URL, PORT: 'http' }, /PORT is a number/],
    [{ DATABASE_URL, PORT: '70000' }, /PORT is 1 to 65535/],
    [{ DATABASE_URL, PEGWELL_URL: 'pegwell.example' }, /PEGWELL_URL is an address/],
    [{ DATABASE_URL, PEGWELL_URL: 'https://example.org/tunes' }, /without a path/],
    [{ DATABASE_URL, PEGWELL_SECRET: 'short' }, /at least 32/],
    [{ DATABASE_URL, PEGWELL_METRICS_TOKEN: 'short' }, /at least 16/],
    [{ DATABASE_URL, PEGWELL_DEMO: 'maybe' }, /"yes" or "no"/],
    [{ DATABASE_URL, PEGWELL_MAIL_URL: 'mail.example' }, /smtp/],
  ])('refuses nonsense with a sentence: %j', (source, sentence) => {
    expect(() => parseEnv(source)).toThrow(EnvError);
    expect(() => parseEnv(source)).toThrow(sentence);
  });

  it('refuses production without a secret', () => {
    expect(() => parseEnv({ DATABASE_URL, NODE_ENV: 'production' })).toThrow(/PEGWELL_SECRET is missing/);
  });

  it('refuses production on a network without HTTPS, unless told that it is a laptop in a hall', () => {
    const open = { DATABASE_URL, NODE_ENV: 'production', PEGWELL_SECRET: secret, PEGWELL_HOST: '0.0.0.0' };
    expect(() => parseEnv(open)).toThrow(/not loopback/);
    expect(parseEnv({ ...open, PEGWELL_URL: 'https://tunes.example.org' }).production).toBe(true);
    expect(parseEnv({ ...open, PEGWELL_INSECURE_LAN: 'yes' }).production).toBe(true);
  });
});
