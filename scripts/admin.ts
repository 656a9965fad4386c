import { spawn } from 'node:child_process';
import { build } from './build';
import { remembered } from './data-folder';
import { reachableAt } from './health';
import { inRoot } from './places';
import { Sentence } from './sentence';
import { borrowDatabase, serverEnvironment, setting } from './site';

const HOST = '127.0.0.1';

/** Makes the first account, or lets a lost host in again; beside a running site too. */
export async function admin(words: readonly string[]): Promise<number> {
  for (const workspace of ['shared', 'server'] as const) {
    if ((await build(workspace, 'show')) !== 0) throw new Sentence(`${workspace} does not build.`);
  }
  const port = remembered().sitePort ?? remembered().pagesPort ?? 3000;
  const env = serverEnvironment({
    ...{ mode: 'production', databaseUrl: await borrowDatabase(), port, host: HOST, demo: 'no' },
    url: setting('PEGWELL_URL') ?? reachableAt(HOST, port),
  });
  const child = spawn(process.execPath, [inRoot('server', 'dist', 'admin.js'), ...words], {
    ...{ cwd: inRoot('server'), env, stdio: 'inherit' },
  });
  return new Promise((resolve) => child.on('close', (code) => resolve(code ?? 1)));
}
