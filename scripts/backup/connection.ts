import { plainEnvironment } from '../postgres';

/**
 * The environment in which PostgreSQL's programs find a database. Not as an argument: other users of the machine
 * can read those, and a password stands in the address.
 */
export function connectionTo(databaseUrl: string): NodeJS.ProcessEnv {
  const { hostname, port, username, password, pathname, searchParams } = new URL(databaseUrl);
  const sslMode = searchParams.get('sslmode');
  return {
    ...plainEnvironment,
    PGHOST: hostname.replace(/^\[|\]$/g, ''),
    PGPORT: port || '5432',
    PGUSER: decodeURIComponent(username),
    PGPASSWORD: decodeURIComponent(password),
    PGDATABASE: decodeURIComponent(pathname.slice(1)),
    ...(sslMode && { PGSSLMODE: sslMode }),
  };
}
