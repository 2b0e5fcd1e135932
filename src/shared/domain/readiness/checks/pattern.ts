import { type CheckResult, result } from '../check.ts';
import type { LaneSituation } from '../situation.ts';
import { runFits, settledByRun } from './by-run.ts';
import { deliveriesAtWarmUp, filmFault } from './film.ts';

/** Right pattern and revision, young enough at warm-up, or a run that makes it so in time. */
export function checkPattern(at: LaneSituation): CheckResult {
  const fault = filmFault(at);
  if (fault) return settledByRun('pattern', at, fault);
  const run = at.run;
  if (run && run.doneAt <= at.session.warmUpAt && runFits(run, at) === 'other') return settledByRun('pattern', at, { code: 'pattern.run-other' });
  return result('pattern', 'ok', 'pattern.dressed', { params: { dressedAt: at.lane.dressed?.at ?? 0, deliveries: deliveriesAtWarmUp(at) ?? at.lane.deliveriesSince } });
}
