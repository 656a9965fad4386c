import type { Env } from '../env';

/** Where players follow. The site's own address, never the Host header: it is printed and scanned. */
export const followUrl = ({ PEGWELL_URL }: Pick<Env, 'PEGWELL_URL'>, code: string): string =>
  `${PEGWELL_URL}/f/${code}`;
