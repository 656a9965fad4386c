import { existsSync } from 'node:fs';
import { forgetBuild } from './build';
import { startChild, type Child } from './children';
import { remember, remembered } from './data-folder';
import { showDemoSignIns } from './demo-sign-ins';
import { untilItAnswers, reachableAt } from './health';
import { catchMail, type CaughtHere } from './mail/catch-mail';
import { inRoot, installed } from './places';
import { choosePort } from './ports';
import { say, Sentence } from './sentence';
import { askedPort, claimSite, openDatabase, serverEnvironment, setting } from './site';

const HOST = '127.0.0.1';
const USUAL_PAGES = 5173;
const USUAL_API = 3001;
// What was compiled last time is kept in dist, so that a second start takes seconds.
const COMPILE_SHARED = [
  '-p',
  'tsconfig.build.json',
  '--incremental',
  '--tsBuildInfoFile',
  'dist/.tsbuildinfo',
];
const COMPILE_SERVER = ['start', '--config', 'nest-cli.dev.json'];

/** Database, server and pages, all of which follow edits, with the demo circle; until Ctrl-C. */
export async function develop(): Promise<number> {
  await claimSite();
  const { pages, api } = await choosePorts();
  const caught = await catchMail([pages, api]);
  const databaseUrl = await openDatabase();
  const url = setting('PEGWELL_URL') ?? `http://${HOST}:${pages}`;
  const apiAddress = reachableAt(HOST, api);

  const compiledBefore = existsSync(inRoot('shared', 'dist', '.tsbuildinfo'));
  // From here on the watchers write into dist.
  forgetBuild('shared', 'server');
  const pagesServer = follow(
    'client',
    'vite',
    ['--port', String(pages), '--strictPort', '--clearScreen', 'false'],
    {
      ...process.env,
      NODE_ENV: 'development',
      PEGWELL_API: apiAddress,
    },
  );
  const shared = follow(
    'shared',
    'tsc',
    [...COMPILE_SHARED, '--watch', '--preserveWatchOutput'],
    process.env,
  );
  // The server's compiler reads what shared was compiled to. From last time that is there, and it follows changes.
  if (!compiledBefore) await Promise.race([shared.says('Watching for file changes'), shared.ended]);
  const env = serverEnvironment({
    mode: 'development',
    databaseUrl,
    port: api,
    host: HOST,
    url,
    demo: 'yes',
    mailUrl: caught?.mailUrl,
  });
  const server = follow('server', 'nest', [...COMPILE_SERVER, '--watch', '--preserveWatchOutput'], env);
  const ended = Promise.race(
    [pagesServer, shared, server].map(async (child) => ({ child, code: await child.ended })),
  );
  void greet(apiAddress, url, caught);
  const { child, code } = await ended;
  throw new Sentence(`The ${child.name} program ended by itself (code ${code}); its reason stands above.`);
}

function follow(
  workspace: 'shared' | 'server' | 'client',
  program: string,
  args: readonly string[],
  env: NodeJS.ProcessEnv,
): Child {
  return startChild({
    name: workspace,
    program: installed(program),
    args,
    cwd: inRoot(workspace),
    env,
    named: true,
  });
}

async function choosePorts(): Promise<{ readonly pages: number; readonly api: number }> {
  const before = remembered();
  const pages = await choosePort({
    whose: 'the pages',
    asked: askedPort(),
    usual: before.pagesPort ?? USUAL_PAGES,
    host: HOST,
  });
  const api = await choosePort({
    whose: 'the API requests',
    usual: before.apiPort ?? USUAL_API,
    host: HOST,
    not: [pages],
  });
  remember({ apiPort: api, ...(askedPort() === undefined && { pagesPort: pages }) });
  return { pages, api };
}

async function greet(apiAddress: string, url: string, caught: CaughtHere | null): Promise<void> {
  if (!(await untilItAnswers(`${apiAddress}/api/health`))) return;
  say(`\nPegwell is at ${url}`);
  await showDemoSignIns(apiAddress);
  if (caught) say(`Mail goes to nobody; what it would have been is at ${caught.pageUrl}`);
  say('Edits show by themselves. Ctrl-C stops everything.\n');
}
