import type { ResponseOf } from '#shared/contracts/contract.ts';
import type { runContracts } from '#shared/contracts/runs.ts';
import type { House } from '#shared/domain/house/state.ts';
import { paceOf } from '#shared/domain/runs/lane-time.ts';
import type { Run } from '#shared/domain/runs/state.ts';
import { type DressingWant, dressingTonight, type NightMachine, type PlannedRun, type Tonight } from '#shared/domain/runs/tonight.ts';
import { tanksTonight } from '#shared/domain/runs/tonight-tanks.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { type Library, revisionIn } from './library.ts';
import { runBar } from './view.ts';

/** Which lanes sessions of this night still want dressed, and how long before warm-up they are to be ready, ms. */
export interface WantsOfNight {
  (centre: CentreRef, house: House, now: number): Promise<{ wants: DressingWant[]; marginMs: number }>;
}

type Answer = ResponseOf<typeof runContracts.tonight>;

const lanesLeft = (run: Run): number[] => (run.lanes ?? []).filter((lane) => !run.done.some((d) => d.lane === lane));

const byTime = (a: Run, b: Run): number => a.lastAt - b.lastAt;

function nightMachines({ runs }: House, library: Library): NightMachine[] {
  return library.machines.map((machine) => {
    const own = [...runs.ended, ...Object.values(runs.active)].filter((run) => run.machine === machine.code);
    const busy = own.find((run) => run.status === 'under-way');
    const last = busy ?? own.filter((run) => run.status === 'finished' || run.status === 'aborted').sort(byTime).at(-1);
    return {
      code: machine.code, capabilities: machine.capabilities, paceMs: paceOf(runs, machine.code), busyUntil: busy ? runBar(busy, runs, library).endAt : null,
      atLane: busy?.lanes?.at(-1) ?? last?.done.at(-1)?.lane ?? null, loadedPattern: last?.pattern ?? null,
    };
  });
}

const planned = ({ runs }: House): PlannedRun[] => Object.values(runs.active).filter((run) => run.status === 'planned').map((run) => ({
  key: run.key, machine: run.machine, pattern: run.pattern, revision: run.revision, lanes: lanesLeft(run), startAt: run.plannedStart,
}));

const NONE: Tonight = {
  blocks: [], unplanned: [], late: [],
  proof: {
    method: 'exact', proven: { sessionsLate: true, lateness: true, freshness: true, travel: true }, bound: { sessionsLate: 0, latenessMs: 0 },
    criteria: { sessionsLate: 0, latenessMs: 0, freshnessLostMs: 0, travelMs: 0, changes: 0 },
  },
};

/** What is still to be dressed tonight, by whom and by when; sessions by their names. */
export function tonightView(house: House, library: Library, of: { wants: readonly DressingWant[]; marginMs: number }, now: number): Answer {
  const { wants, marginMs } = of;
  const revisionOf = (code: string, revision: number | null) => revisionIn(library, code, revision);
  const night = dressingTonight({
    now, marginMs, wants, machines: nightMachines(house, library), planned: planned(house),
    underWay: Object.values(house.runs.active).filter((run) => run.status === 'under-way').map((run) => run.key),
    revisionOf,
  });
  const { blocks, unplanned, late, proof } = night ?? NONE;
  const runsOut = library.machines.flatMap(({ code }) => {
    const busy = Object.values(house.runs.active).filter((run) => run.machine === code && run.status === 'under-way');
    const ahead = [...busy.map((run) => ({ lanes: lanesLeft(run), pattern: run.pattern, revision: run.revision })), ...blocks.filter((block) => block.machine === code)];
    const levels = house.runs.levels[code];
    return tanksTonight(code, { tankA: levels?.tankAUl ?? null, tankB: levels?.tankBUl ?? null }, ahead, revisionOf);
  });
  const session = new Map(wants.map((want) => [want.session, want]));
  const nameOf = (id: string): string => session.get(id)?.name ?? id;
  const machineName = (code: string | number): string => library.machines.find((machine) => machine.code === code)?.name ?? String(code);
  const named = (because: Tonight['late'][number]['because']) => because.map(({ code, params }) => ({ code, params: params['machine'] === undefined ? params : { ...params, machine: machineName(params['machine']) } }));
  return {
    at: now, possible: night !== null, proof, runsOut,
    blocks: blocks.map(({ session: id, breaksFirst, lanes, freeUnknown, ...block }) => {
      const want = id === null ? undefined : session.get(id);
      return { ...block, lanes: [...lanes], freeUnknown: [...freeUnknown], breaksFirst: breaksFirst && nameOf(breaksFirst), session: want ? { id: want.session, name: want.name, warmUpAt: want.warmUpAt } : null };
    }),
    unplanned: unplanned.map((one) => ({ session: nameOf(one.session), lanes: [...one.lanes], because: named(one.because) })),
    late: late.filter((one) => session.has(one.session)).map((one) => ({ session: nameOf(one.session), byMs: one.byMs, because: named(one.because) })),
  };
}
