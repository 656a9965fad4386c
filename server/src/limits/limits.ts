import type { ProblemCode } from '@pegwell/shared/contract/errors';

/** How often something may be tried. A window begins with the first try that counts. */
export interface Limit {
  readonly tries: number;
  readonly seconds: number;
}

const MINUTE = 60;
const HOUR = 60 * MINUTE;

/**
 * Whose tries are counted together:
 * - `here` one e-mail address from one network address: who guesses one password from one place;
 * - `address` one e-mail address from everywhere: NIST SP 800-63B allows at most 100 wrong tries in a row;
 * - `network` one network address: a thousand phones of a hall stand behind one, so it is wide;
 * - `account` one who is signed in.
 */
export type Counted = 'here' | 'address' | 'network' | 'account';

export interface LimitRule {
  readonly limits: Partial<Record<Counted, Limit>>;
  /** Whether only wrong tries count (what was right is taken off again), or all of them. */
  readonly counts: 'wrong' | 'all';
  /** Codes of the problems that a wrong try meets. */
  readonly wrong?: readonly ProblemCode[];
  /** What was too much; "Wait …" follows. */
  readonly words: string;
}

export const limitRules = {
  /** Passwords: at sign-in, and wherever the present one is asked for. */
  password: {
    limits: {
      here: { tries: 10, seconds: 15 * MINUTE },
      address: { tries: 100, seconds: 24 * HOUR },
      account: { tries: 10, seconds: 15 * MINUTE },
      network: { tries: 2_000, seconds: HOUR },
    },
    counts: 'wrong',
    wrong: ['wrong-credentials', 'wrong-password'],
    words: 'That were too many wrong passwords.',
  },
  /** Whatever makes this server send a mail: it must not become somebody's nuisance. */
  mail: {
    limits: {
      address: { tries: 5, seconds: HOUR },
      account: { tries: 5, seconds: HOUR },
      network: { tries: 1_000, seconds: HOUR },
    },
    counts: 'all',
    words: 'That were many mails already.',
  },
  /** The tokens of links in mail: 256 bits that nobody guesses, but a new password is hashed before they are judged. */
  link: {
    limits: { network: { tries: 1_000, seconds: HOUR } },
    counts: 'wrong',
    wrong: ['link-over'],
    words: 'From your network came too many links that are over.',
  },
  /** An account costs a mail and a tenth of a second. A hall may make its thousand in one evening. */
  register: {
    limits: { network: { tries: 3_000, seconds: HOUR } },
    counts: 'all',
    words: 'From your network many accounts were made.',
  },
  /** A file is read and matched with the whole library: seconds of work at its largest. */
  import: {
    limits: { account: { tries: 300, seconds: 10 * MINUTE } },
    counts: 'all',
    words: 'That were many files in a short time.',
  },
} as const satisfies Record<string, LimitRule>;
export type LimitName = keyof typeof limitRules;

/**
 * Codes that open nothing, by network address. A thousand phones may all mistype; and at this pace whoever
 * guesses needs years: 8.5e11 codes, 6,000 guesses an hour, a thousand evenings under way make one hit in 16 years.
 */
export const CODE_MISSES: Limit = { tries: 1_000, seconds: 10 * MINUTE };

/** Work that holds a core: how much of it one may have under way. Who waits for each answer has one. */
export const atOnce = {
  suggest: {
    account: 8,
    network: 32,
    words: 'You asked for many orders at once. Take them one after the other.',
  },
  import: { account: 3, network: 32, words: 'Other files of yours are still being read.' },
} as const;
export type AtOnceName = keyof typeof atOnce;
