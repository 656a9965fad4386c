import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { build } from './build';
import { startChild } from './children';
import { remember, remembered } from './data-folder';
import { showDemoSignIns } from './demo-sign-ins';
import { reachableAt, untilItAnswers } from './health';
import { CACHE, inRoot } from './places';
import { choosePort } from './ports';
import { say, Sentence } from './sentence';
import { askedPort, claimSite, openDatabase, serverEnvironment, setting } from './site';

const USUAL_SITE = 3000;

/** As in production: built, one Node.js process that serves the API and the pages; until Ctrl-C. */
export async function start(): Promise<number> {
  await claimSite();
  const host = setting('PEGWELL_HOST') ?? '127.0.0.1';
  const asked = askedPort();
  const port = await choosePort({
    whose: 'the pages',
    asked,
    usual: remembered().sitePort ?? USUAL_SITE,
    host,
  });
  if (!asked) remember({ sitePort: port });
  const address = reachableAt(host, port);
  const url = setting('PEGWELL_URL') ?? address;

  await buildAll();
  const databaseUrl = await openDatabase();
  const server = startChild({
    name: 'server',
    program: process.execPath,
    args: ['--enable-source-maps', inRoot('server', 'dist', 'main.js')],
    cwd: inRoot('server'),
    env: serverEnvironment({ mode: 'production', databaseUrl, port, host, url, demo: 'no' }),
    named: false,
  });
  void greet(address, url);
  throw new Sentence(`The server ended by itself (code ${await server.ended}); its reason stands above.`);
}

async function buildAll(): Promise<void> {
  const log = path.join(CACHE, 'build.log');
  mkdirSync(CACHE, { recursive: true });
  rmSync(log, { force: true });
  say('Building what has changed ...');
  for (const workspace of ['shared', 'server', 'client'] as const) {
    if ((await build(workspace, { file: log })) === 0) continue;
    throw new Sentence(
      `${readFileSync(log, 'utf8').trimEnd()}\n${workspace} does not build; its reason stands above.`,
    );
  }
}

async function greet(address: string, url: string): Promise<void> {
  if (!(await untilItAnswers(`${address}/api/health`))) return;
  say(`\nPegwell is at ${url}`);
  // On somebody's real site nobody tries the demo's password.
  const demoMayBe = setting('DATABASE_URL') === undefined || setting('PEGWELL_DEMO') === 'yes';
  if (demoMayBe) await showDemoSignIns(address);
  say('Ctrl-C stops it.\n');
}
