import { build } from './build';
import { startChild } from './children';
import { remember, remembered } from './data-folder';
import { showDemoSignIns } from './demo-sign-ins';
import { reachableAt, untilItAnswers } from './health';
import { inRoot } from './places';
import { choosePort } from './ports';
import { say, Sentence } from './sentence';
import { askedPort, openSite, serverEnvironment, setting } from './site';

const USUAL_SITE = 3000;

/** As in production: built, one Node.js process that serves the API and the pages; until Ctrl-C. */
export async function start(): Promise<number> {
  const { databaseUrl } = await openSite();
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

  for (const workspace of ['shared', 'server', 'client'] as const) {
    if ((await build(workspace, 'show')) !== 0) throw new Sentence(`${workspace} does not build; see above.`);
  }
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

async function greet(address: string, url: string): Promise<void> {
  if (!(await untilItAnswers(`${address}/api/health`))) return;
  say(`\nPegwell is at ${url}`);
  // On somebody's real site nobody tries the demo's password.
  const demoMayBe = setting('DATABASE_URL') === undefined || setting('PEGWELL_DEMO') === 'yes';
  if (demoMayBe) await showDemoSignIns(address);
  say('Ctrl-C stops it.\n');
}
