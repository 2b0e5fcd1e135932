import { type CheckResult, result } from '../check.ts';
import type { LaneSituation, RunOnLane } from '../situation.ts';
import { filmFault } from './film.ts';

/** The machine of the run that this lane waits for: works, isn't called for, and its tanks and battery last to this lane. */
export function checkMachine(at: LaneSituation): CheckResult {
  const { run } = at;
  if (!run || !filmFault(at)) return result('machine', 'ok', 'machine.not-needed');
  const code = standing(at, run) ?? called(at) ?? empty(at, run);
  if (code === null) return result('machine', 'ok', 'machine.fine', { params: { machine: run.machine } });
  return result('machine', 'at-risk', code, { params: { machine: run.machine, run: run.run }, waitsFor: { kind: 'mechanic', name: null } });
}

/** Under way, and no word for several of its lanes. */
function standing({ now, paceMs, settings }: LaneSituation, run: RunOnLane): string | null {
  return run.status === 'under-way' && run.startAt <= now && now - run.lastAt > settings.stalledPaces * paceMs ? 'machine.stands' : null;
}

const called = ({ calls }: LaneSituation): string | null =>
  calls.some((call) => call.equipment === 'lane-machine' && call.returnedAt === null) ? 'machine.call-open' : null;

function empty({ levels, patterns, settings }: LaneSituation, run: RunOnLane): string | null {
  const level = levels[run.machine];
  if (!level) return null;
  if (level.batteryPct !== null && level.batteryPct < settings.lowBatteryPct) return 'machine.battery-low';
  const revision = patterns.find((p) => p.code === run.pattern)?.revisions.find((r) => r.revision === run.revision);
  if (!revision) return null;
  const short = (tank: number | null, ul: number): boolean => tank !== null && tank < ul * run.place;
  return short(level.tankAUl, revision.aUl) || short(level.tankBUl, revision.bUl) ? 'machine.tank-short' : null;
}
