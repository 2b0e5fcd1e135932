import { mkdirSync, symlinkSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { GROUND, PACKAGES, PLANTED } from './planted-dependencies.ts';
import { PLANTED_LINT, SOUND } from './planted-lint.ts';
import { dependencyViolations, lintViolations, plant, ROOT, typeErrors } from './tools.ts';

const config = createRequire(import.meta.url)('../../.dependency-cruiser.cjs') as { forbidden: { name: string }[] };

describe('rules of dependencies', async () => {
  const planted = PLANTED.map(({ file, text, with: more }) => ({ [file]: text, ...more }));
  const tree = plant(Object.assign({ ...GROUND }, ...planted) as Record<string, string>);
  for (const name of PACKAGES) {
    mkdirSync(join(tree.at, 'node_modules', name), { recursive: true });
    writeFileSync(join(tree.at, 'node_modules', name, 'package.json'), JSON.stringify({ name, main: 'index.js', exports: { '.': './index.js', './mini': './index.js' } }));
    writeFileSync(join(tree.at, 'node_modules', name, 'index.js'), 'module.exports = {};\n');
  }
  afterAll(tree.remove);
  const { violations, modules } = await dependencyViolations(tree.at, ['src', 'server', 'jobs']);

  it.each(PLANTED.map(({ rule, file }) => [rule, file] as const))('%s is caught in %s', (rule, file) => {
    expect(violations.filter((v) => v.file === file).map((v) => v.rule)).toContain(rule);
  });

  it('complain of nothing else', () => {
    expect(modules).toBeGreaterThan(PLANTED.length);
    const sound = new Set(Object.keys(GROUND));
    expect(violations.filter((v) => sound.has(v.file))).toEqual([]);
  });

  it('are each planted once at least; one edge of either side stands for all', () => {
    const edges = /^edge-/;
    expect(config.forbidden.map(({ name }) => name).filter((name) => !edges.test(name) && !PLANTED.some(({ rule }) => rule === name))).toEqual([]);
  });
});

it('types: an index that may be missing is told from one that is there', async () => {
  const tree = plant({ 'src/shared/planted.ts': 'export const first = (all: number[]): number => all[0];\n' });
  symlinkSync(join(ROOT, 'node_modules'), join(tree.at, 'node_modules'));
  afterAll(tree.remove);
  expect(await typeErrors(tree.at)).toMatch(/^src\/shared\/planted\.ts\(1,\d+\): error TS2322/);
});

describe('rules of lint', async () => {
  const tree = plant({ ...Object.fromEntries(PLANTED_LINT.map(({ file, text }) => [file, text])), ...SOUND });
  symlinkSync(join(ROOT, 'node_modules'), join(tree.at, 'node_modules'));
  afterAll(tree.remove);
  const { violations } = await lintViolations(tree.at);

  it.each(PLANTED_LINT.map(({ rule, file }) => [rule, file] as const))('%s is caught in %s', (rule, file) => {
    expect(violations.filter((v) => v.file === file).map((v) => v.rule)).toContain(rule);
  });

  it('complain of nothing else', () => {
    expect(violations.filter((v) => v.file in SOUND)).toEqual([]);
    expect(violations.filter((v) => v.rule === 'parser')).toEqual([]);
  });
});
