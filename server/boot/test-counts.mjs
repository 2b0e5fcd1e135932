// From vitest's JSON report to the two numbers of the last line.
import fs from 'node:fs';

/**
 * Counts of a run, given its report's file and vitest's exit code. A file that
 * couldn't be loaded counts as one failure, and so does a run that ended badly,
 * or in which nothing ran, without any failing test to show for it.
 */
export function countTests(report, code) {
  const notes = [];
  const files = fs.existsSync(report) ? JSON.parse(fs.readFileSync(report, 'utf8')).testResults : [];
  const results = files.flatMap((file) => file.assertionResults);
  const passed = results.filter(({ status }) => status === 'passed').length;
  let failed = results.filter(({ status }) => status === 'failed').length;
  for (const file of files) {
    if (file.status !== 'failed' || file.assertionResults.some(({ status }) => status === 'failed')) continue;
    failed += 1;
    notes.push(`${file.name} failed as a whole.`);
  }
  if (failed === 0 && (code !== 0 || passed === 0)) {
    failed = 1;
    notes.push(passed === 0 ? 'No test ran.' : `The run ended with exit ${code}.`);
  }
  return { passed, failed, notes };
}
