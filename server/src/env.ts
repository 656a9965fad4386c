import { z } from 'zod';

/**
 * The configuration, parsed once at the start. Nonsense is refused with a sentence that names the
 * variable, so that a wrong setting never shows up later as a strange page.
 */
const yesNo = (name: string) =>
  z
    .enum(['yes', 'no', ''], { error: `${name} is "yes" or "no".` })
    .default('no')
    .transform((word) => word === 'yes');

const webAddress = z
  .string()
  .regex(
    /^https?:\/\/[^/\s?#]+\/?$/,
    'PEGWELL_URL is an address without a path, as https://tunes.example.org.',
  )
  .transform((text) => new URL(text).origin);

const envSchema = z.object({
  NODE_ENV: z.string().default('development'),
  PORT: z.coerce
    .number({ error: 'PORT is a number.' })
    .int('PORT is a whole number.')
    .min(1, 'PORT is 1 to 65535.')
    .max(65_535, 'PORT is 1 to 65535.')
    .default(3001),
  PEGWELL_HOST: z.string().min(1).default('127.0.0.1'),
  /** Addresses of proxies whose X-Forwarded-For is believed, by comma. */
  PEGWELL_PROXIES: z
    .string()
    .default('')
    .transform((text) =>
      text
        .split(',')
        .map((part) => part.trim())
        .filter(Boolean),
    ),
  DATABASE_URL: z
    .string({ error: 'DATABASE_URL is missing: the address of a PostgreSQL database.' })
    .regex(/^postgres(ql)?:\/\//, 'DATABASE_URL begins with postgresql://.'),
  PEGWELL_DATA_DIR: z.string().min(1).default('.data'),
  PEGWELL_URL: webAddress.optional(),
  PEGWELL_SECRET: z.string().min(32, 'PEGWELL_SECRET has at least 32 characters.').optional(),
  PEGWELL_MAIL_URL: z
    .string()
    .regex(/^smtps?:\/\//, 'PEGWELL_MAIL_URL begins with smtp:// or smtps://.')
    .optional(),
  /** The address that mail comes from. */
  PEGWELL_MAIL_FROM: z.email('PEGWELL_MAIL_FROM is an e-mail address.').optional(),
  /** Opens /api/metrics; without one, it opens on this machine alone. */
  PEGWELL_METRICS_TOKEN: z.string().min(16, 'PEGWELL_METRICS_TOKEN has at least 16 characters.').optional(),
  PEGWELL_DEMO: yesNo('PEGWELL_DEMO'),
  PEGWELL_INSECURE_LAN: yesNo('PEGWELL_INSECURE_LAN'),
  PEGWELL_LOG: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
});

export interface Env extends Omit<z.infer<typeof envSchema>, 'PEGWELL_URL' | 'PEGWELL_SECRET'> {
  readonly PEGWELL_URL: string;
  readonly PEGWELL_SECRET: string;
  readonly production: boolean;
}

/** Injection token of the parsed environment. */
export const ENV = Symbol('env');

const LOOPBACK = new Set(['127.0.0.1', '::1', 'localhost']);
/** Only where nothing real is behind it; production refuses to start without a secret of its own. */
const DEVELOPMENT_SECRET = 'development only: not a secret at all';

export class EnvError extends Error {}

/** @throws EnvError with one sentence per wrong variable. */
export function parseEnv(source: Readonly<Record<string, string | undefined>>): Env {
  // An empty variable is an absent one: that is how shells and unit files say "not set".
  const given = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ''));
  const parsed = envSchema.safeParse(given);
  if (!parsed.success) {
    throw new EnvError(
      parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`).join('\n'),
    );
  }
  const env = parsed.data;
  const production = env.NODE_ENV === 'production';
  const host = env.PEGWELL_HOST.includes(':') ? `[${env.PEGWELL_HOST}]` : env.PEGWELL_HOST;
  const url = env.PEGWELL_URL ?? `http://${host}:${env.PORT}`;
  if (production && env.PEGWELL_SECRET === undefined) {
    throw new EnvError('PEGWELL_SECRET is missing: production needs at least 32 random characters.');
  }
  if (
    production &&
    !LOOPBACK.has(env.PEGWELL_HOST) &&
    !url.startsWith('https:') &&
    !env.PEGWELL_INSECURE_LAN
  ) {
    throw new EnvError(
      'PEGWELL_HOST is not loopback and PEGWELL_URL is not https: put HTTPS in front, or say PEGWELL_INSECURE_LAN=yes for a laptop in a hall.',
    );
  }
  return { ...env, PEGWELL_URL: url, PEGWELL_SECRET: env.PEGWELL_SECRET ?? DEVELOPMENT_SECRET, production };
}
