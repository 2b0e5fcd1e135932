import type { Fact, FactOf } from '../journal/fact.ts';
import type { MachineLevels, Run, RunLane, RunsState } from './state.ts';

const PACES_KEPT = 40;
const codeOf = ({ machine, run }: Pick<Run, 'machine' | 'run'>): string => `${machine}/${run}`;

/** The run that has a machine's code now, or had it last since the checkpoint. */
export const runWith = (runs: RunsState, machine: string, run: string): Run | undefined =>
  runs.active[codeOf({ machine, run })] ?? runs.ended.findLast((r) => r.machine === machine && r.run === run);

const microlitres = (ml: number | undefined): number | null => (ml === undefined ? null : Math.round(ml * 1000));

/** (runs, fact) → runs, for facts in their order. */
export function foldRuns(runs: RunsState, fact: Fact): RunsState {
  switch (fact.type) {
    case 'run.planned': return plan(runs, fact);
    case 'run.started': return start(runs, fact);
    case 'run.lane.dressed': return dress(runs, fact);
    case 'run.lane.skipped': return lane(runs, fact, { ...blank(fact.data.lane), outcome: 'skipped', reason: fact.data.reason });
    case 'run.finished': return end(runs, fact, 'finished', null);
    case 'run.aborted': return abort(runs, fact);
    case 'run.cancelled': return end(runs, fact, 'cancelled', fact.data.reason);
    case 'machine.levels': return { ...runs, levels: { ...runs.levels, [fact.data.machine]: levels(runs.levels[fact.data.machine], fact) } };
    default: return runs;
  }
}

type RunFact = Extract<Fact, { data: { machine: string; run: string } }>;

const blank = (lane: number): RunLane => ({
  lane, outcome: 'dressed', startedAt: null, finishedAt: null, aUl: null, bUl: null, cleanerUl: null, measured: false, reason: null,
});

/** The run a fact is about. A start under the code of a run that has ended is another run: nothing of the old one is written over. */
function known(runs: RunsState, fact: RunFact): Run {
  const { machine, run } = fact.data;
  const found = runWith(runs, machine, run);
  const begins = fact.type === 'run.started' || fact.type === 'run.planned';
  if (found && !(begins && (found.status === 'finished' || found.status === 'aborted'))) return found;
  return {
    key: `${codeOf({ machine, run })}/${fact.time}`, machine, run, pattern: null, revision: null, lanes: null, status: 'under-way', plannedStart: null,
    startedAt: null, endedAt: null, reason: null, entered: fact.by?.kind === 'user' ? 'hand' : 'gateway', done: [], lastAt: fact.time,
  };
}

const isActive = (run: Run): boolean => run.status === 'planned' || run.status === 'under-way';

/** A machine that makes a planned run begins it; also one that was taken back: what was laid is on the lanes, whatever was wanted. */
const begun = (run: Run): Run => (run.status === 'planned' || run.status === 'cancelled' ? { ...run, status: 'under-way', endedAt: null, reason: null } : run);

function put(runs: RunsState, run: Run): RunsState {
  const code = codeOf(run);
  const { [code]: _before, ...active } = runs.active;
  if (isActive(run)) return { ...runs, active: { ...active, [code]: run }, ended: without(runs.ended, run.key) };
  const place = runs.ended.findLastIndex((r) => r.key === run.key);
  return { ...runs, active, ended: place < 0 ? [...runs.ended, run] : runs.ended.with(place, run) };
}

const without = (list: readonly Run[], key: string): readonly Run[] => (list.some((r) => r.key === key) ? list.filter((r) => r.key !== key) : list);

function plan(runs: RunsState, fact: FactOf<'run.planned'>): RunsState {
  const { pattern, revision, lanes, startAt } = fact.data;
  return put(runs, { ...known(runs, fact), pattern, revision, lanes, status: 'planned', plannedStart: startAt, entered: 'hand', lastAt: fact.time });
}

/** A machine does one run at a time: one that was never closed ends where the next begins. */
function start(runs: RunsState, fact: FactOf<'run.started'>): RunsState {
  const mine = begun(known(runs, fact));
  const others = Object.values(runs.active).filter((r) => r.machine === mine.machine && r.status === 'under-way' && r.key !== mine.key);
  const closed = others.reduce((all, r) => put(all, { ...r, status: 'finished', endedAt: r.done.at(-1)?.finishedAt ?? fact.time, reason: 'not-closed' }), runs);
  return put(closed, {
    ...mine, startedAt: mine.startedAt ?? fact.time, pattern: fact.data.pattern ?? mine.pattern,
    revision: fact.data.revision ?? mine.revision, lanes: fact.data.lanes ?? mine.lanes, lastAt: fact.time,
  });
}

function dress(runs: RunsState, fact: FactOf<'run.lane.dressed'>): RunsState {
  const { lane: number, startedAt, finishedAt, conditionerMl, cleanerMl, measured } = fact.data;
  const before = known(runs, fact).done.findLast((d) => d.finishedAt !== null);
  const pace = finishedAt - Math.max(before?.finishedAt ?? startedAt, startedAt - 10 * 60_000);
  const paces = pace > 0 ? { ...runs.paces, [fact.data.machine]: [...(runs.paces[fact.data.machine] ?? []), pace].slice(-PACES_KEPT) } : runs.paces;
  return lane({ ...runs, paces }, fact, {
    ...blank(number), startedAt, finishedAt, aUl: microlitres(conditionerMl?.a), bUl: microlitres(conditionerMl?.b), cleanerUl: microlitres(cleanerMl), measured: measured ?? false,
  });
}

function lane(runs: RunsState, fact: FactOf<'run.lane.dressed'> | FactOf<'run.lane.skipped'>, done: RunLane): RunsState {
  const run = begun(known(runs, fact));
  return put(runs, { ...run, startedAt: run.startedAt ?? done.startedAt ?? fact.time, done: [...run.done.filter((d) => d.lane !== done.lane), done], lastAt: fact.time });
}

function abort(runs: RunsState, fact: FactOf<'run.aborted'>): RunsState {
  const run = known(runs, fact);
  const broken = fact.data.lane === undefined ? run.done
    : [...run.done.filter((d) => d.lane !== fact.data.lane), { ...blank(fact.data.lane), outcome: 'broken-off' as const, reason: fact.data.reason }];
  return end(put(runs, { ...run, done: broken }), fact, 'aborted', fact.data.reason);
}

function end(runs: RunsState, fact: RunFact, status: Run['status'], reason: string | null): RunsState {
  const run = known(runs, fact);
  return put(runs, { ...run, status, endedAt: fact.time, reason, lastAt: fact.time });
}

function levels(before: MachineLevels | undefined, fact: FactOf<'machine.levels'>): MachineLevels {
  const said = fact.data;
  return {
    machine: said.machine,
    at: fact.time,
    tankAUl: microlitres(said.tankAMl) ?? before?.tankAUl ?? null,
    tankBUl: microlitres(said.tankBMl) ?? before?.tankBUl ?? null,
    cleanerUl: microlitres(said.cleanerMl) ?? before?.cleanerUl ?? null,
    wasteUl: microlitres(said.wasteMl) ?? before?.wasteUl ?? null,
    batteryPct: said.batteryPct ?? before?.batteryPct ?? null,
  };
}
