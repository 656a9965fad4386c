import { forgetBuild } from './build';
import { startChild, type Child } from './children';
import { remember, remembered } from './data-folder';
import { showDemoSignIns } from './demo-sign-ins';
import { untilItAnswers, reachableAt } from './health';
import { inRoot, installed } from './places';
import { choosePort } from './ports';
import { run } from './run';
import { say, Sentence } from './sentence';
import { askedPort, openSite, serverEnvironment, setting } from './site';

const HOST = '127.0.0.1';
const USUAL_PAGES = 5173;
const USUAL_API = 3001;

/** Database, server and pages, all of which follow edits, with the demo circle; until Ctrl-C. */
export async function develop(): Promise<number> {
  const { databaseUrl } = await openSite();
  const { pages, api } = await choosePorts();
  const url = setting('PEGWELL_URL') ?? `http://${HOST}:${pages}`;
  const apiAddress = reachableAt(HOST, api);

  // The server's build reads shared's, and from here on the watchers write both.
  forgetBuild('shared', 'server');
  say('Building ...');
  const shared = ['-p', 'tsconfig.build.json'];
  const built = await run(installed('tsc'), shared, { cwd: inRoot('shared') });
  if (built.code !== 0) throw new Sentence(`shared does not compile:\n${built.output.trimEnd()}`);

  const env = serverEnvironment({
    mode: 'development',
    databaseUrl,
    port: api,
    host: HOST,
    url,
    demo: 'yes',
  });
  const children = [
    follow('shared', 'tsc', [...shared, '--watch', '--preserveWatchOutput'], process.env),
    follow('server', 'nest', ['start', '--watch', '--preserveWatchOutput'], env),
    follow('client', 'vite', ['--port', String(pages), '--strictPort', '--clearScreen', 'false'], {
      ...process.env,
      NODE_ENV: 'development',
      PEGWELL_API: apiAddress,
    }),
  ];
  const ended = Promise.race(children.map(async (child) => ({ child, code: await child.ended })));
  void greet(apiAddress, url);
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

async function greet(apiAddress: string, url: string): Promise<void> {
  if (!(await untilItAnswers(`${apiAddress}/api/health`))) return;
  say(`\nPegwell is at ${url}`);
  await showDemoSignIns(apiAddress);
  say('Edits show by themselves. Ctrl-C stops everything.\n');
}
