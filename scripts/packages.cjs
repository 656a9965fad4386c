// Installs the npm packages when what is installed is not what package-lock.json says.
// Plain JavaScript: it runs before there is anything that could read TypeScript.
const { spawnSync } = require('node:child_process');
const { readFileSync } = require('node:fs');
const path = require('node:path');

const root = path.resolve(__dirname, '..');
const OLDEST_NPM = 11;

function packagesIn(file) {
  try {
    return JSON.parse(readFileSync(path.join(root, file), 'utf8')).packages;
  } catch {
    return null;
  }
}

/**
 * npm leaves `node_modules/.package-lock.json` as the last act of an installation: what it really installed.
 * Packages for other systems are optional and missing there; everything else must be the same.
 */
function installedAsLocked() {
  const locked = packagesIn('package-lock.json');
  const installed = packagesIn('node_modules/.package-lock.json');
  if (!locked || !installed) return false;
  return Object.entries(locked).every(([place, wanted]) => {
    if (!place.includes('node_modules/') || wanted.link) return true;
    const found = installed[place];
    if (!found) return Boolean(wanted.optional || wanted.devOptional);
    return found.version === wanted.version && found.integrity === wanted.integrity;
  });
}

function npm(args, options) {
  return spawnSync('npm', args, { cwd: root, encoding: 'utf8', ...options });
}

if (!installedAsLocked()) {
  const version = npm(['--version']);
  if (version.error || version.status !== 0) {
    console.error('Pegwell needs npm, which comes with Node.js, and none is on the PATH.');
    process.exit(1);
  }
  if (parseInt(version.stdout, 10) < OLDEST_NPM) {
    console.error(
      `Pegwell's packages are installed with npm ${OLDEST_NPM} or later; this is npm ${version.stdout.trim()}.\n` +
        `Install it with: npm install --global npm@${OLDEST_NPM}`,
    );
    process.exit(1);
  }
  console.log('Installing the npm packages of package-lock.json (a minute or so) ...');
  // npm's own words appear even below a silent `npm test`; the audit and the advertisements are off in .npmrc.
  const done = npm(['ci', '--loglevel=warn'], { stdio: ['ignore', 'inherit', 'inherit'] });
  if (done.status !== 0) {
    console.error('npm could not install the packages; its reason stands above.');
    process.exit(1);
  }
}
