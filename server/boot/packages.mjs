// What a fresh machine lacks: Debian's packages, and the ones in node_modules.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { withLock } from './lock.mjs';
import { which } from './processes.mjs';
import { root, say, step, StopError, withoutNpm } from './steps.mjs';

const STAMP = path.join(root, 'node_modules', '.made-from');
/** Two copies started at once in one checkout install one after the other. */
export const SETUP_LOCK = path.join(root, '.data', 'setup.lock');
export const SETUP_PATIENCE = { patienceMs: 600_000 };

export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  const fits = (major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major > 22;
  if (!fits) throw new StopError(`Node ${process.version} won't do: 20.19 or later, or 22.12 or later, is needed.`);
}

/** Debian's packages for the programs that are missing. */
function missingPackages({ database, browser }) {
  const missing = [];
  if (database && (!which('mariadbd', 'mysqld') || !which('mariadb-install-db', 'mysql_install_db'))) missing.push('mariadb-server-core', 'mariadb-client-core');
  if (browser && !which('chromium-headless-shell')) missing.push('chromium-headless-shell');
  return missing;
}

/** Installs Debian's packages as root or by sudo; else says the one command and stops. */
export async function ensurePrograms({ database = true, browser = false, tell = say }) {
  const missing = missingPackages({ database, browser });
  if (missing.length === 0) return;
  const apt = which('apt-get');
  const asRoot = process.getuid?.() === 0;
  const bySudo = !asRoot && which('sudo') !== undefined && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0;
  if (!apt || !(asRoot || bySudo)) {
    throw new StopError(
      `Missing: ${missing.join(', ')}. Run this, then the same command again:\n  sudo sh -c 'apt-get update && apt-get install -y --no-install-recommends ${missing.join(' ')}'`,
    );
  }
  const [command, ...before] = asRoot ? [apt] : ['sudo', '-n', 'DEBIAN_FRONTEND=noninteractive', apt];
  const options = { env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }, stdio: ['ignore', 2, 2], tell };
  const run = (text, ...args) => step(text, command, [...before, '-qq', '-o', 'DPkg::Lock::Timeout=300', ...args], options);
  await run('Asking Debian which packages there are', 'update');
  await run(`Installing ${missing.join(', ')}`, 'install', '-y', '--no-install-recommends', ...missing);
}

/** Runs `npm ci` unless node_modules holds exactly what the lock says, for this platform and Node. */
export async function ensureModules({ tell = say } = {}) {
  const wanted = modulesWanted();
  if (read(STAMP) === wanted) return;
  await withLock(
    SETUP_LOCK,
    async () => {
      const found = read(STAMP);
      if (found === wanted) return;
      if (!sameKind(found, wanted) || !isInstalled()) {
        await step('Installing the packages of package-lock.json (npm ci)', 'npm', ['ci', '--include=dev', '--prefer-offline', '--no-audit', '--no-fund'], { env: withoutNpm(), stdio: ['ignore', 2, 2], tell });
      }
      fs.writeFileSync(STAMP, wanted);
    },
    SETUP_PATIENCE,
  );
}

function modulesWanted() {
  const lock = createHash('sha256').update(fs.readFileSync(path.join(root, 'package-lock.json'))).digest('hex');
  return `${process.platform}-${process.arch}-node${process.versions.node.split('.')[0]} ${lock}`;
}

/** No stamp, or one of this platform and Node: then npm's own list of what it installed decides. */
const sameKind = (found, wanted) => found === '' || found.split(' ')[0] === wanted.split(' ')[0];

function read(file) {
  try {
    return fs.readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}

/** Does npm's list of what it installed (written last, when all is in place) agree with the lock? */
function isInstalled() {
  const installed = read(path.join(root, 'node_modules', '.package-lock.json'));
  if (installed === '') return false;
  const has = JSON.parse(installed).packages;
  const wants = JSON.parse(read(path.join(root, 'package-lock.json'))).packages;
  return Object.entries(wants).every(
    ([name, entry]) => name === '' || has[name]?.version === entry.version || (has[name] === undefined && (entry.optional || entry.peer)),
  );
}
