import { existsSync, readdirSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { dependencyViolations, lintViolations, ROOT, typeErrors } from './tools.ts';

const edges = createRequire(import.meta.url)('./edges.cjs') as Record<'server' | 'client', Record<string, string[]>>;
const FOLDERS = ['src', 'server', 'jobs', 'migrations', 'seeds', 'tests'];
/** Each tool reads the whole project; other tests run beside it. */
const LONG = 600_000;

describe('the project', () => {
  it('type-checks', async () => {
    expect(await typeErrors(ROOT)).toBe('');
  }, LONG);

  it('has no lint errors and no warnings', async () => {
    const { files, violations } = await lintViolations(ROOT.replace(/\/$/, ''));
    expect(files).toBeGreaterThan(200);
    expect(violations.map((v) => `${v.file}:${v.line} ${v.rule} ${v.message}`)).toEqual([]);
  }, LONG);

  it('keeps the rules of dependencies', async () => {
    const { modules, violations } = await dependencyViolations(ROOT, FOLDERS.filter((folder) => existsSync(join(ROOT, folder))));
    expect(modules).toBeGreaterThan(300);
    expect(violations).toEqual([]);
  }, LONG);

  it.each([['server', 'server/capabilities'], ['client', 'src/features']] as const)('declares the edges of every slice of the %s', (side, folder) => {
    const slices = readdirSync(join(ROOT, folder), { withFileTypes: true }).filter((entry) => entry.isDirectory()).map((entry) => entry.name);
    expect(slices.length).toBeGreaterThan(0);
    expect(slices.filter((slice) => !(slice in edges[side]))).toEqual([]);
    for (const slice of slices) expect(existsSync(join(ROOT, folder, slice, 'index.ts')), `${slice} has a front door`).toBe(true);
  });

  it.each(['server', 'client'] as const)('lets edges of the %s run one way', (side) => {
    const reaches = (from: string, to: string, seen = new Set<string>()): boolean =>
      (edges[side][from] ?? []).some((next) => next === to || (!seen.has(next) && reaches(next, to, seen.add(next))));
    expect(Object.keys(edges[side]).filter((slice) => reaches(slice, slice))).toEqual([]);
  });
});
