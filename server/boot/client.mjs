// The built client, made again when what it is made from has changed.
import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { withLock } from './lock.mjs';
import { SETUP_LOCK, SETUP_PATIENCE } from './packages.mjs';
import { root, say, step } from './steps.mjs';

const SOURCES = ['src', 'public', 'index.html', 'vite.config.ts', 'tailwind.config.ts', 'package-lock.json'];
const STAMP = path.join(root, 'dist', '.made-from');

/** Builds the client into `dist` unless it was made from these very sources. */
export async function ensureClient({ tell = say } = {}) {
  if (isBuilt()) return;
  await withLock(
    SETUP_LOCK,
    async () => {
      if (isBuilt()) return;
      const wanted = sourcesHash();
      const env = { ...process.env, NODE_ENV: 'production' };
      await step('Building the client', process.execPath, [path.join(root, 'node_modules/vite/bin/vite.js'), 'build', '--logLevel', 'warn'], { env, stdio: ['ignore', 2, 2], tell });
      fs.writeFileSync(STAMP, wanted);
    },
    SETUP_PATIENCE,
  );
}

function isBuilt() {
  try {
    return fs.readFileSync(STAMP, 'utf8') === sourcesHash();
  } catch {
    return false;
  }
}

function sourcesHash() {
  const hash = createHash('sha256');
  for (const source of SOURCES) {
    for (const file of filesBelow(path.join(root, source))) {
      hash.update(`${path.relative(root, file)}\0`).update(fs.readFileSync(file)).update('\0');
    }
  }
  return hash.digest('hex');
}

/** Files below a path, in order of name, without tests. */
function filesBelow(place) {
  const found = fs.statSync(place, { throwIfNoEntry: false });
  if (found === undefined) return [];
  if (found.isFile()) return /\.test\.tsx?$/.test(place) ? [] : [place];
  return fs.readdirSync(place).sort().flatMap((name) => filesBelow(path.join(place, name)));
}
