import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { countTests } from './test-counts.mjs';

const folder = mkdtempSync(join(tmpdir(), 'lanewright-counts-'));
afterAll(() => rmSync(folder, { recursive: true }));

const countsOf = (files: [status: string, tests: string[]][], code: number) => {
  const report = join(folder, 'report.json');
  const testResults = files.map(([status, tests], index) => ({ name: `file ${index}`, status, assertionResults: tests.map((result) => ({ status: result })) }));
  writeFileSync(report, JSON.stringify({ testResults }));
  const { passed, failed } = countTests(report, code);
  return { passed, failed };
};

test('tests are counted over all files', () => {
  expect(countsOf([['passed', ['passed', 'passed']], ['failed', ['passed', 'failed']]], 1)).toEqual({ passed: 3, failed: 1 });
});

test('a file that could not be loaded is a failure', () => {
  expect(countsOf([['passed', ['passed']], ['failed', []]], 1)).toEqual({ passed: 1, failed: 1 });
});

test('a file whose set-up failed is a failure though no test of it did', () => {
  expect(countsOf([['failed', ['passed', 'skipped']]], 1)).toEqual({ passed: 1, failed: 1 });
});

test('a run that ended badly is a failure', () => {
  expect(countsOf([['passed', ['passed']]], 1)).toEqual({ passed: 1, failed: 1 });
});

test('nothing ran: a failure, and so is no report at all', () => {
  expect(countsOf([], 0)).toEqual({ passed: 0, failed: 1 });
  expect(countTests(join(folder, 'none.json'), 0)).toMatchObject({ passed: 0, failed: 1 });
});
