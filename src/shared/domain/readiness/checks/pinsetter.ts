import type { Call } from '../../calls/state.ts';
import { type CheckResult, result } from '../check.ts';
import { type LaneSituation, latestDressing } from '../situation.ts';
import { callParams, hasOpenStop, isUnsettled, mechanicOf, stageOf } from './call-words.ts';
import { filmFault } from './film.ts';

/** In service, no stop open, no call unanswered. A machine that runs again and only lacks its cause doesn't hold. */
export function checkPinsetter(at: LaneSituation): CheckResult {
  const { lane } = at;
  if (lane.outOfService) {
    return holds(at, 'pinsetter.out-of-service', { reason: lane.outOfService.reason, sinceAt: lane.outOfService.since }, null);
  }
  const calls = at.calls.filter((call) => call.equipment === 'pinsetter' && call.safety === null);
  const open = calls.find(isUnsettled);
  if (open) return ofCall(at, open);
  if (lane.stop) return holds(at, 'pinsetter.stopped', { sinceAt: lane.stop.since }, null);
  return result('pinsetter', 'ok', calls.length > 0 ? 'pinsetter.cause-missing' : 'pinsetter.fine');
}

function ofCall(at: LaneSituation, call: Call): CheckResult {
  const stage = stageOf(call);
  const code = `pinsetter.${stage}`;
  const stands = hasOpenStop(call) || at.lane.stop !== null || stage === 'mechanic-in' || stage === 'out-of-service' || stage === 'unanswered';
  if (stands) return holds(at, code, callParams(call), mechanicOf(call));
  return result('pinsetter', 'at-risk', code, { params: callParams(call), waitsFor: { kind: 'mechanic', name: mechanicOf(call) } });
}

/** Repaired in time means: in time to dress the lane after it, where the film needs it or test balls will spoil a fresh one. */
function holds(at: LaneSituation, code: string, params: CheckResult['params'], mechanic: string | null): CheckResult {
  const dressing = at.session.fresh || filmFault(at) !== null;
  const by = dressing ? latestDressing(at) + at.paceMs : at.session.warmUpAt;
  return result('pinsetter', 'holds', code, {
    params: { ...params, byAt: by, dress: dressing ? 1 : 0 }, settles: { by, what: 'mechanic' }, waitsFor: { kind: 'mechanic', name: mechanic },
    latestStart: dressing ? latestDressing(at) : null,
  });
}
