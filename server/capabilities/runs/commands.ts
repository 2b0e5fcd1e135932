import type { BodyOf } from '#shared/contracts/contract.ts';
import type { runContracts } from '#shared/contracts/runs.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import { cannotLay } from '#shared/domain/runs/capability.ts';
import { runWith } from '#shared/domain/runs/fold.ts';
import type { Run } from '#shared/domain/runs/state.ts';
import { patternVolume } from '#shared/domain/runs/volume.ts';
import { conflict, invalid, notFound, Refusal } from '#server/platform/http/refusal.ts';
import type { Decision, HouseAt, NewFact } from '#server/platform/journal/ledger.ts';
import { type Library, revisionIn } from './library.ts';
import type { Revision } from './store.ts';

const WEEK_MS = 7 * 86_400_000;

type Plan = BodyOf<typeof runContracts.plan>;
type Recorded = BodyOf<typeof runContracts.record>;

const done = (facts: NewFact[]): Decision<HouseAt> => ({ facts, result: (after) => after });

function machineIn(library: Library, code: string) {
  const machine = library.machines.find((m) => m.code === code);
  if (!machine) throw invalid('machine.unknown', '/machine', { machine: code });
  return machine;
}

/** Refuses lanes that the house hasn't or that come twice. */
function demandLanes(house: HouseAt, lanes: readonly number[]): void {
  const unknown = lanes.findIndex((lane) => lane > house.state.floor.length);
  if (unknown >= 0) throw invalid('run.lanes-unknown', `/lanes/${unknown}`, { lane: lanes[unknown] ?? 0 });
  const twice = lanes.findIndex((lane, i) => lanes.indexOf(lane) !== i);
  if (twice >= 0) throw invalid('run.lane-twice', `/lanes/${twice}`, { lane: lanes[twice] ?? 0 });
}

/** A run ends where it breaks off, so it does so on one lane at most. */
function demandOneBreak(lanes: Recorded['lanes']): void {
  const second = lanes.findIndex((l, i) => l.outcome === 'broken-off' && lanes.slice(0, i).some((before) => before.outcome === 'broken-off'));
  if (second >= 0) throw invalid('run.broken-off-twice', `/lanes/${second}`, { lane: lanes[second]?.lane ?? 0 });
}

/** The revision meant, if the machine can lay it; else all the reasons why not. */
function demandRevision(library: Library, machineCode: string, code: string, revision: number | null): Revision {
  const machine = machineIn(library, machineCode);
  const found = revisionIn(library, code, revision);
  if (!found) throw invalid('pattern.unknown', '/pattern', { pattern: code });
  const reasons = cannotLay(machine.capabilities, found.body, { oil: true, clean: false, deckTreatment: false });
  if (reasons.length > 0) {
    throw new Refusal(422, 'run.machine-cannot', { machine: machine.name, pattern: code }, reasons.map((r) => ({ pointer: '/machine', code: r.code, params: r.params })));
  }
  return found;
}

/** The newest fact about the machine's runs: what is recorded now comes after it. */
const lastOf = (house: HouseAt, machine: string): number =>
  Math.max(0, ...[...Object.values(house.state.runs.active), ...house.state.runs.ended].filter((r) => r.machine === machine).map((r) => r.lastAt));

const runOf = (house: HouseAt, machine: string, run: string, earlier: Run | null): Run | null =>
  runWith(house.state.runs, machine, run) ?? earlier;

/** A code that this machine hasn't used: the one given, else the next whole number of its runs. */
function nextCode(house: HouseAt, machine: string, given: string | undefined, earlier: Run | null): string {
  if (given !== undefined) {
    if (runOf(house, machine, given, earlier)) throw new Refusal(409, 'run.code-taken', { run: given }, [{ pointer: '/run', code: 'run.code-taken', params: { run: given } }]);
    return given;
  }
  const used = new Set([...Object.values(house.state.runs.active), ...house.state.runs.ended].filter((r) => r.machine === machine).map((r) => r.run));
  let n = 1;
  while (used.has(`hand-${house.seq}-${n}`)) n += 1;
  return `hand-${house.seq}-${n}`;
}

/** `earlier` here and below: the run of that machine and code in the tables, or null; those that ended before the last cut are only there. */
export function planRun(house: HouseAt, library: Library, body: Plan, by: Person, now: number, earlier: Run | null): { decision: Decision<HouseAt>; run: string } {
  demandLanes(house, body.lanes);
  const revision = demandRevision(library, body.machine, body.pattern, body.revision ?? null);
  if (body.startAt < now - 60_000) throw invalid('run.start-past', '/startAt');
  const run = nextCode(house, body.machine, body.run, earlier);
  const data = { machine: body.machine, run, pattern: revision.code, revision: revision.revision, lanes: body.lanes, startAt: body.startAt };
  return { decision: done([{ type: 'run.planned', data, by, after: lastOf(house, body.machine) }]), run };
}

/** A run written down afterwards: its facts stand at its own times. Volumes are computed from the pattern and marked so. */
export function recordRun(house: HouseAt, library: Library, body: Recorded, by: Person, now: number, earlier: Run | null): { decision: Decision<HouseAt>; run: string } {
  demandLanes(house, body.lanes.map((l) => l.lane));
  demandOneBreak(body.lanes);
  const { machine, startedAt, finishedAt } = body;
  if (finishedAt <= startedAt) throw invalid('run.end-before-start', '/finishedAt');
  if (finishedAt > now) throw invalid('run.end-in-future', '/finishedAt');
  if (startedAt < now - WEEK_MS) throw invalid('run.too-old', '/startedAt');
  const revision = body.pattern === undefined ? null : demandRevision(library, machine, body.pattern, body.revision ?? null);
  if (!revision) machineIn(library, machine);
  const run = nextCode(house, machine, body.run, earlier);
  const volume = revision && patternVolume(revision.body).byProduct;
  const conditionerMl = volume ? { conditionerMl: { a: volume.A / 1000, ...(volume.B > 0 ? { b: volume.B / 1000 } : {}) } } : {};
  const each = (finishedAt - startedAt) / body.lanes.length;
  const broken = body.lanes.find((l) => l.outcome === 'broken-off');
  const lanes = body.lanes.flatMap((l, i): NewFact[] => {
    const ended = Math.round(startedAt + each * (i + 1)) - 1;
    if (l.outcome === 'dressed') {
      return [{ type: 'run.lane.dressed', data: { machine, run, lane: l.lane, startedAt: Math.round(startedAt + each * i), finishedAt: ended, ...conditionerMl, measured: false }, by, at: ended }];
    }
    return l.outcome === 'skipped' ? [{ type: 'run.lane.skipped', data: { machine, run, lane: l.lane, reason: l.reason ?? '' }, by, at: ended }] : [];
  });
  const end: NewFact = broken
    ? { type: 'run.aborted', data: { machine, run, lane: broken.lane, reason: broken.reason ?? '' }, by, at: finishedAt }
    : { type: 'run.finished', data: { machine, run }, by, at: finishedAt };
  const start: NewFact = {
    type: 'run.started', data: { machine, run, ...(revision ? { pattern: revision.code, revision: revision.revision } : {}), lanes: body.lanes.map((l) => l.lane) }, by, at: startedAt,
  };
  return { decision: done([start, ...lanes, end]), run };
}

export function cancelRun(house: HouseAt, machine: string, run: string, reason: string, by: Person, earlier: Run | null): Decision<HouseAt> {
  const found = runOf(house, machine, run, earlier);
  if (!found) throw notFound('run.unknown', { run });
  if (found.status !== 'planned') throw conflict('run.not-planned', { run });
  return done([{ type: 'run.cancelled', data: { machine, run, reason }, by, after: found.lastAt }]);
}
