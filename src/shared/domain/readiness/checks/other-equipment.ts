import type { Call } from '../../calls/state.ts';
import type { Equipment } from '../../equipment.ts';
import { type CheckResult, result } from '../check.ts';
import type { LaneSituation } from '../situation.ts';
import { callParams, isUnsettled, mechanicOf, stageOf } from './call-words.ts';

/** One can bowl without them, or somebody mends them in a minute. */
const LIGHT: readonly Equipment[] = ['console', 'masking', 'motion-sensor', 'bumpers'];
const ELSEWHERE: readonly Equipment[] = ['pinsetter', 'lane-machine'];

/** Ball return, lift, foul unit, scoring, power, approach … of the lane and what its pair shares; any danger holds. */
export function checkOtherEquipment(at: LaneSituation): CheckResult {
  const open = at.calls.filter((call) => (call.safety !== null || !ELSEWHERE.includes(call.equipment)) && isUnsettled(call));
  const worst = open.find((call) => weightOf(call) === 'holds') ?? open[0];
  if (!worst) return result('other-equipment', 'ok', 'other.fine');
  const weight = weightOf(worst);
  const code = worst.safety !== null ? 'other.danger' : `other.${stageOf(worst)}`;
  return result('other-equipment', weight, code, {
    params: { ...callParams(worst), safety: worst.safety ?? '', byAt: at.session.warmUpAt },
    settles: weight === 'holds' ? { by: at.session.warmUpAt, what: 'mechanic' } : null,
    waitsFor: { kind: worst.safety !== null && worst.acknowledged === null ? 'desk' : 'mechanic', name: mechanicOf(worst) },
  });
}

/** A power dip of the house names no lane: what it left behind shows up lane by lane. */
const weightOf = (call: Call): 'holds' | 'at-risk' =>
  call.safety === null && (LIGHT.includes(call.equipment) || call.scope === 'house') ? 'at-risk' : 'holds';
