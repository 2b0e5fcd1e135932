/** Counts of a test run, from vitest's JSON report (a file) and its exit code. */
export function countTests(report: string, code: number): { passed: number; failed: number; notes: string[] };
