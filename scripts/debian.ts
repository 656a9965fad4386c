import { readFile } from 'node:fs/promises';
import { asRoot } from './rights';
import { run } from './run';
import { say, Sentence } from './sentence';

const CREATE_CLUSTER = '/etc/postgresql-common/createcluster.conf';
/** Another apt may be at work, for instance the nightly one; it is waited for this long, in seconds. */
const LOCK_PATIENCE = 120;

type Wish = {
  /** What it is for, as in "PostgreSQL": starts the sentences. */
  readonly what: string;
  readonly packages: readonly string[];
  /** What else the reader can do when nothing may be installed here. */
  readonly otherwise?: string;
};

/** Installs packages of Debian, as root or with sudo; a sentence with the line to type when neither works. */
export async function installFromDebian({ what, packages, otherwise }: Wish): Promise<void> {
  const line = `apt-get install -y --no-install-recommends ${packages.join(' ')}`;
  const helpYourself = [
    `Please have it installed by somebody who may: sudo ${line}`,
    ...(otherwise ? [otherwise] : []),
  ].join('\n');
  if ((await run('apt-get', ['--version'])).code !== 0) {
    throw new Sentence(`${what} is missing, and this is no Debian that could bring it.\n${helpYourself}`);
  }
  const prefix = await asRoot();
  if (!prefix) {
    throw new Sentence(
      `${what} is missing, and only root or a user with sudo can install it from Debian.\n${helpYourself}`,
    );
  }
  say(`${what} is missing; installing it from Debian: ${packages.join(', ')} ...`);
  await rootly(prefix, ['apt-get', 'update', '-qq'], what, helpYourself);
  if (packages.includes('postgresql')) await keepDebiansClusterAway(prefix, what, helpYourself);
  await aptInstall(prefix, packages, what, helpYourself);
}

async function aptInstall(
  prefix: readonly string[],
  packages: readonly string[],
  what: string,
  helpYourself: string,
): Promise<void> {
  const apt = ['apt-get', 'install', '-y', '-qq', '--no-install-recommends'];
  const patience = ['-o', `DPkg::Lock::Timeout=${LOCK_PATIENCE}`];
  await rootly(
    prefix,
    ['env', 'DEBIAN_FRONTEND=noninteractive', ...apt, ...patience, ...packages],
    what,
    helpYourself,
  );
}

/**
 * Debian makes and starts a cluster of its own on port 5432 with the server package, unless told not to.
 * The file that tells it comes with postgresql-common, which therefore goes first.
 */
async function keepDebiansClusterAway(
  prefix: readonly string[],
  what: string,
  helpYourself: string,
): Promise<void> {
  await aptInstall(prefix, ['postgresql-common'], what, helpYourself);
  const told = /^\s*create_main_cluster\s*=\s*(false|off|no|0)\s*$/im;
  if (told.test(await readFile(CREATE_CLUSTER, 'utf8').catch(() => ''))) return;
  const change = `sed -i '/^[[:space:]]*create_main_cluster/d' ${CREATE_CLUSTER}; echo 'create_main_cluster = false' >> ${CREATE_CLUSTER}`;
  await rootly(prefix, ['sh', '-c', change], what, helpYourself);
}

async function rootly(
  prefix: readonly string[],
  command: readonly string[],
  what: string,
  helpYourself: string,
): Promise<void> {
  const [program = '', ...args] = [...prefix, ...command];
  const asks = prefix.length === 1;
  const { code, output } = await run(program, args, { mayAsk: asks, output: asks ? 'show' : 'keep' });
  if (code === 0) return;
  throw new Sentence(
    `${output.trimEnd()}\n${what} could not be installed: \`${command.join(' ')}\` failed.\n${helpYourself}`.trim(),
  );
}
