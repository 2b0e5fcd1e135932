// `npm test` and `npm run bench`: sets up what is missing, runs on a database of the tests' own, ends with the counts.
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { ensureClient } from './client.mjs';
import { useDatabase } from './database-use.mjs';
import { checkNode, ensureModules, ensurePrograms } from './packages.mjs';
import { makeDataDir, readSettings } from './settings.mjs';
import { endSteps, root, runEntry, runToEnd, say } from './steps.mjs';
import { countTests } from './test-counts.mjs';

/** Settings of whoever runs the tests don't reach them; DATA_DIR says where their database is kept. */
const NOT_FOR_TESTS = ['PORT', 'DB_PORT', 'DATABASE_URL', 'SMTP_URL', 'PUBLIC_URL', 'LANEWRIGHT_DEMO', 'NODE_ENV', 'LOG_LEVEL'];

async function main() {
  const [bench, args] = process.argv[2] === '--bench' ? [true, process.argv.slice(3)] : [false, process.argv.slice(2)];
  const env = Object.fromEntries(Object.entries(process.env).filter(([name]) => !NOT_FOR_TESTS.includes(name)));
  const settings = readSettings(env);
  checkNode();
  makeDataDir(settings);
  await ensurePrograms({ browser: true });
  await ensureModules();
  await ensureClient();
  const database = await useDatabase(path.join(settings.dataDir, 'test'), { small: true, fast: !bench, say });
  try {
    const ownEnv = { ...env, DATA_DIR: settings.dataDir };
    return bench ? await runBench(args, { ...ownEnv, DATABASE_URL: database.url }) : await runTests(args, ownEnv);
  } finally {
    await database.release();
  }
}

const runBench = (args, env) => runToEnd(process.execPath, ['--import', 'tsx', path.join(root, 'tests/bench/main.ts'), ...args], { env });

async function runTests(args, env) {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), 'lanewright-test-'));
  const report = path.join(folder, 'report.json');
  const vitest = path.join(root, 'node_modules/vitest/vitest.mjs');
  try {
    const code = await runToEnd(process.execPath, [vitest, 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...args], { env });
    const { passed, failed, notes } = countTests(report, code);
    for (const note of notes) say(note);
    // the last line, after whatever stopping the database may say
    process.on('exit', () => say(`${passed} passed, ${failed} failed`));
    return failed === 0 ? 0 : 1;
  } finally {
    fs.rmSync(folder, { recursive: true, force: true });
  }
}

process.on('SIGINT', () => {});
process.on('SIGTERM', endSteps);
process.on('SIGHUP', endSteps);
await runEntry(main);
