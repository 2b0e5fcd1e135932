// `npm run check`: types, lint, dependency rules, tests, build; says which failed.
import path from 'node:path';
import { checkNode, ensureModules } from './packages.mjs';
import { endSteps, root, runEntry, runToEnd, say } from './steps.mjs';

const CHECKS = {
  types: ['node_modules/typescript-seven/bin/tsc', '-p', 'tsconfig.json'],
  lint: ['node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0'],
  rules: ['node_modules/dependency-cruiser/bin/dependency-cruise.mjs', 'src', 'server', 'jobs', 'migrations', 'seeds', 'tests', '--config', '.dependency-cruiser.cjs'],
  tests: ['server/boot/test.mjs'],
  build: ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn'],
};

async function main() {
  checkNode();
  await ensureModules();
  const failed = [];
  for (const [name, [file, ...args]] of Object.entries(CHECKS)) {
    say(`— ${name}`);
    const code = await runToEnd(process.execPath, [path.join(root, file), ...args]);
    if (code !== 0) failed.push(name);
  }
  say(failed.length === 0 ? `All sound: ${Object.keys(CHECKS).join(', ')}` : `Failed: ${failed.join(', ')}`);
  return failed.length === 0 ? 0 : 1;
}

process.on('SIGTERM', endSteps);
await runEntry(main);
