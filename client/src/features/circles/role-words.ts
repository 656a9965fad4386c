import type { Role } from '@pegwell/shared/contract/circles';

/** What a role may do, as a host needs to hear it when giving one. */
export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  host: 'everything, and who is in the circle',
  cohost: 'tunes, tunings and evenings',
  player: 'reads along and follows',
};
