import { type CheckResult, result } from '../check.ts';
import type { LaneSituation } from '../situation.ts';
import { settledByRun } from './by-run.ts';

/** A lane on which the machine broke off is cleaned and dressed again before anybody bowls on it. */
export function checkRunComplete(at: LaneSituation): CheckResult {
  const { brokenOff } = at.lane;
  if (!brokenOff) return result('run-complete', 'ok', 'run.complete');
  return settledByRun('run-complete', at, { code: 'run.broken-off', params: { run: brokenOff.run, machine: brokenOff.machine } });
}
