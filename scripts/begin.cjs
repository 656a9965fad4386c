// Installs the npm packages when what is installed is not what package-lock.json says, then goes on in TypeScript.
// Plain JavaScript, because it runs before there is anything that could read TypeScript. All in one process, so
// that a signal to it is a signal to the command.
const { spawn, spawnSync } = require('node:child_process');
const { createHash } = require('node:crypto');
const { readFileSync, writeFileSync } = require('node:fs');
const path = require('node:path');

const root = path.resolve(__dirname, '..');
const OLDEST_NPM = 11;

/** Left after an installation by this script: the fingerprint of the lock file it followed. */
const STAMP = path.join(root, 'node_modules', '.pegwell-locked');

function read(file) {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}

function fingerprint() {
  return createHash('sha256')
    .update(read(path.join(root, 'package-lock.json')))
    .digest('hex');
}

/**
 * Whether somebody's own `npm install` did the work: npm's last act is to write what it really installed.
 * Packages for other systems are optional and missing there; everything else must be the same.
 */
function sameByHand() {
  const installed = read(path.join(root, 'node_modules', '.package-lock.json'));
  if (!installed) return false;
  const found = JSON.parse(installed).packages;
  const locked = JSON.parse(read(path.join(root, 'package-lock.json'))).packages;
  return Object.entries(locked).every(([place, wanted]) => {
    if (!place.includes('node_modules/') || wanted.link || wanted.extraneous) return true;
    const there = found[place];
    if (!there) return Boolean(wanted.optional || wanted.devOptional);
    return there.version === wanted.version && there.integrity === wanted.integrity;
  });
}

function stop(...sentences) {
  console.error(sentences.join('\n'));
  process.exit(1);
}

function checkNpm() {
  const { error, status, stdout } = spawnSync('npm', ['--version'], { cwd: root, encoding: 'utf8' });
  if (error || status !== 0) stop('Pegwell needs npm, which comes with Node.js, and none is on the PATH.');
  if (parseInt(stdout, 10) >= OLDEST_NPM) return;
  stop(
    `Pegwell's packages are installed with npm ${OLDEST_NPM} or later; this is npm ${stdout.trim()}.`,
    `Bring it up to date with: npm install --global npm@${OLDEST_NPM}`,
  );
}

/** Ends the half-done installation with us; the next start begins it anew. */
function installPackages() {
  console.log('Installing the npm packages of package-lock.json (a minute or so) ...');
  // npm's own words appear even below a silent `npm test`.
  const npm = spawn('npm', ['ci', '--loglevel=warn'], {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
    detached: true,
  });
  const signals = ['SIGINT', 'SIGTERM', 'SIGHUP'];
  const endBoth = () => {
    process.kill(-npm.pid, 'SIGKILL');
    process.exit(130);
  };
  signals.forEach((signal) => process.on(signal, endBoth));
  return new Promise((resolve) => npm.on('close', resolve)).then((code) => {
    signals.forEach((signal) => process.off(signal, endBoth));
    if (code !== 0) stop('npm could not install the packages; its reason stands above.');
  });
}

async function begin() {
  if (read(STAMP) !== fingerprint() && !sameByHand()) {
    checkNpm();
    await installPackages();
    writeFileSync(STAMP, fingerprint());
  }
  require('tsx/cjs');
  require('./pegwell.ts');
}

void begin();
