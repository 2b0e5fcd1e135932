import { cannotLay, type MachineCapability } from './capability.ts';
import type { PatternRevision } from './pattern.ts';
import { makePlan } from './plan/plan.ts';
import { formBlocks, type LaneJob } from './plan/cut.ts';
import { type Explanation, type MachinePlan, MAX_MACHINES, type Pin, type Plan, type PlanBlock, type PlannedBlock, type PlanInput, type PlanMachine } from './plan/model.ts';
import { passVolume } from './volume.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
/** Getting to a lane that isn't the neighbour, and changing what is loaded: common practice until a centre measures its own. */
const TRAVEL = { fixedMs: MINUTE, perLaneMs: 5000 };
const CHANGE_MS = { network: MINUTE / 2, hand: 3 * MINUTE };

/** A lane that must be dressed before a session. `freeAt`: its pair is free then, ms; null: nobody knows. `run`: the run that will do it. */
export interface WantedLane {
  lane: number;
  freeAt: number | null;
  run: string | null;
}

/** What a session still wants dressed. */
export interface DressingWant {
  session: string;
  name: string;
  warmUpAt: number;
  pattern: string | null;
  revision: number | null;
  lanes: readonly WantedLane[];
}

/** A lane machine as it stands now. */
export interface NightMachine {
  code: string;
  capabilities: MachineCapability;
  /** Time a lane, with the move to its neighbour, ms. */
  paceMs: number;
  /** The run that it is on ends then; null: it stands. */
  busyUntil: number | null;
  atLane: number | null;
  loadedPattern: string | null;
}

/** A run that somebody has planned, with the lanes that are still to do. */
export interface PlannedRun {
  key: string;
  machine: string;
  pattern: string | null;
  revision: number | null;
  lanes: readonly number[];
  startAt: number | null;
}

export interface Night {
  now: number;
  /** Lanes are to be ready so long before warm-up, ms. */
  marginMs: number;
  wants: readonly DressingWant[];
  machines: readonly NightMachine[];
  planned: readonly PlannedRun[];
  underWay: readonly string[];
  /** A revision of a pattern that is written down; without a number the newest. */
  revisionOf: (code: string, revision: number | null) => { revision: number; body: PatternRevision } | undefined;
}

/** One stretch of work: a planned run, or lanes that no run has yet. */
export interface TonightBlock {
  id: string;
  run: string | null;
  session: string | null;
  pattern: string;
  revision: number | null;
  machine: string;
  lanes: readonly number[];
  startAt: number;
  endAt: number;
  /** Begun later than this, `breaksFirst` isn't ready by its warm-up; null: no session waits for it. */
  startBy: number | null;
  breaksFirst: string | null;
  /** Lanes of which nobody knows when they are free. */
  freeUnknown: readonly number[];
}

export interface Tonight {
  blocks: TonightBlock[];
  unplanned: { session: string; lanes: readonly number[]; because: Explanation[] }[];
  late: Plan['late'];
  proof: Pick<Plan, 'method' | 'proven' | 'criteria' | 'bound'>;
}

interface Draft {
  block: PlanBlock;
  run: PlannedRun | null;
  want: DressingWant | null;
  revision: number | null;
  freeUnknown: number[];
}

/** Who can lay a pattern, and how long each takes; `only`: the machine of a planned run, which somebody chose. */
function paces(night: Night, pattern: string, revision: number | null, only: string | null): Pick<PlanBlock, 'perLaneMs' | 'product'> {
  const found = night.revisionOf(pattern, revision);
  const laid = new Set((found?.body.passes ?? []).filter((pass) => passVolume(pass) > 0).map((pass) => pass.product));
  const able = night.machines.filter((machine) => only === null
    ? found && cannotLay(machine.capabilities, found.body, { oil: true, clean: false, deckTreatment: false }).length === 0
    : machine.code === only);
  return { perLaneMs: Object.fromEntries(able.map((machine) => [machine.code, machine.paceMs])), product: [...laid].sort().join('') };
}

const releaseOf = (lane: WantedLane, now: number): number => Math.max(now, lane.freeAt ?? now);

/** Lanes that no run has yet, cut into blocks. */
function openBlocks(night: Night, wants: readonly DressingWant[], machines: readonly PlanMachine[]): Draft[] {
  const jobs = wants.flatMap((want) => (want.pattern === null ? [] : want.lanes.filter((lane) => lane.run === null).map((lane): LaneJob => ({
    lane: lane.lane, sessionId: want.session, warmUp: want.warmUpAt, release: releaseOf(lane, night.now), pattern: want.pattern ?? '', ...paces(night, want.pattern ?? '', want.revision, null),
  }))));
  return formBlocks(jobs, machines).flatMap((block): Draft[] => {
    const want = wants.find((one) => one.session === block.sessionId);
    if (!want) return [];
    const unknown = new Set(want.lanes.filter((lane) => lane.freeAt === null).map((lane) => lane.lane));
    return [{
      block, run: null, want, revision: night.revisionOf(block.pattern, want.revision)?.revision ?? want.revision,
      freeUnknown: block.lanes.map((lane) => lane.lane).filter((lane) => unknown.has(lane)),
    }];
  });
}

/** A planned run serves the first of the sessions that wait for it; nobody's only keeps its machine. */
function runBlock(night: Night, run: PlannedRun): Draft {
  const waiting = night.wants.filter((want) => want.lanes.some((lane) => lane.run === run.key)).sort((a, b) => a.warmUpAt - b.warmUpAt);
  const want = waiting[0] ?? null;
  const wanted = new Map(waiting.flatMap((w) => w.lanes.filter((lane) => lane.run === run.key).map((lane) => [lane.lane, lane] as const)));
  const lanes = run.lanes.map((lane) => ({ lane, release: releaseOf(wanted.get(lane) ?? { lane, freeAt: null, run: run.key }, night.now) }));
  const begin = Math.max(night.now, run.startAt ?? night.now);
  return {
    block: {
      id: run.key, sessionId: want?.session ?? `nobody/${run.key}`, lanes, warmUp: want?.warmUpAt ?? begin + 24 * HOUR,
      pattern: run.pattern ?? '', ...paces(night, run.pattern ?? '', run.revision, run.machine),
    },
    run, want, revision: run.revision, freeUnknown: [...wanted.values()].filter((lane) => lane.freeAt === null).map((lane) => lane.lane),
  };
}

const planMachine = (machine: NightMachine, now: number): PlanMachine => ({
  id: machine.code, availableFrom: Math.max(now, machine.busyUntil ?? now), atLane: machine.atLane, loadedPattern: machine.loadedPattern, loadedProduct: null,
  travel: TRAVEL, patternChangeMs: CHANGE_MS[machine.capabilities.patterns], productChangeMs: 0, services: [], stores: {},
});

/** The same orders, but nothing holds a start: how late may each begin? */
const ordersOf = (plans: readonly MachinePlan[]): Pin[] => plans.flatMap(({ machine, blocks }) => blocks.flatMap(({ block }, i): Pin[] => {
  const before = blocks[i - 1]?.block;
  return [{ kind: 'machine', block, machine }, ...(before === undefined ? [] : [{ kind: 'order' as const, before, after: block }])];
}));

/** Blocks of one session that a machine does without a stop in between are one stretch of work. */
function joined(blocks: readonly TonightBlock[]): TonightBlock[] {
  return blocks.reduce<TonightBlock[]>((done, block) => {
    const before = done.at(-1);
    const goesOn = before && before.run === null && block.run === null && before.machine === block.machine && before.session === block.session && before.pattern === block.pattern && before.endAt === block.startAt;
    return goesOn ? [...done.slice(0, -1), { ...before, lanes: [...before.lanes, ...block.lanes], endAt: block.endAt, freeUnknown: [...before.freeUnknown, ...block.freeUnknown] }] : [...done, block];
  }, []);
}

/** The plan with the runs that people hold fast; without their starts where those can't be held together. */
function planAround(input: PlanInput, drafts: readonly Draft[]): Plan {
  const starts = drafts.flatMap(({ block, run }): Pin[] => (run && run.startAt !== null && run.startAt > input.now ? [{ kind: 'start', block: block.id, at: run.startAt }] : []));
  const held = makePlan({ ...input, pins: starts });
  return held.unplanned.some(({ because }) => because.some(({ code }) => code === 'pins.conflict')) ? makePlan(input) : held;
}

/**
 * What is still to be dressed tonight, by which machine, from when and by when at the latest. Runs that people planned keep their machine and
 * start; lanes that no run has are planned around them by the plan's own criteria. Null without a machine, or with more than three.
 */
export function dressingTonight(night: Night): Tonight | null {
  if (night.machines.length === 0 || night.machines.length > MAX_MACHINES) return null;
  const settled = new Set(night.underWay);
  const wants = night.wants.map((want) => ({ ...want, lanes: want.lanes.filter((lane) => lane.run === null || !settled.has(lane.run)) })).filter((want) => want.lanes.length > 0);
  const machines = night.machines.map((machine) => planMachine(machine, night.now));
  const drafts = [...night.planned.map((run) => runBlock({ ...night, wants }, run)).filter(({ block }) => block.lanes.length > 0), ...openBlocks(night, wants, machines)];
  const input: PlanInput = { now: night.now, marginMs: night.marginMs, machines, blocks: drafts.map(({ block }) => block) };
  const plan = planAround(input, drafts);
  const latest = new Map(makePlan({ ...input, pins: ordersOf(plan.machines) }).machines.flatMap(({ blocks }) => blocks.map((block) => [block.block, block] as const)));
  const draftOf = new Map(drafts.map((draft) => [draft.block.id, draft]));
  const blocks = plan.machines.flatMap(({ machine, blocks: placed }) => joined(placed.flatMap((at) => {
    const draft = draftOf.get(at.block);
    return draft ? [blockOf(draft, at, draft.want ? latest.get(at.block) : undefined, machine)] : [];
  })));
  const nameless = wants.filter((want) => want.pattern === null).map((want) => ({ session: want.session, lanes: want.lanes.filter((l) => l.run === null).map((l) => l.lane), because: [{ code: 'block.no-pattern' as const, params: {} }] }));
  const unplanned = plan.unplanned.map((one) => ({ session: one.session, lanes: draftOf.get(one.block)?.block.lanes.map((lane) => lane.lane) ?? [], because: one.because }));
  return { blocks: blocks.sort((a, b) => a.startAt - b.startAt), unplanned: [...unplanned, ...nameless.filter((one) => one.lanes.length > 0)], late: plan.late, proof: { method: plan.method, proven: plan.proven, criteria: plan.criteria, bound: plan.bound } };
}

const blockOf = ({ block, run, want, revision, freeUnknown }: Draft, at: PlannedBlock, latest: PlannedBlock | undefined, machine: string): TonightBlock => ({
  id: block.id, run: run?.key ?? null, session: want?.session ?? null, pattern: block.pattern, revision, machine, lanes: block.lanes.map((lane) => lane.lane),
  startAt: at.start, endAt: at.end, startBy: latest?.latestStart ?? null, breaksFirst: latest?.breaksFirst ?? null, freeUnknown,
});
