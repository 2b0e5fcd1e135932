import * as z from 'zod/mini';
import { centreParams, contract, date, instant, laneNumber, line, note } from './contract.ts';
import { machineView, runBar } from './floor.ts';

/** Codes that a centre gives its machines, runs and patterns. */
const code = z.string().check(z.regex(/^[a-z0-9](?:[a-z0-9-]{0,38}[a-z0-9])?$/));
/** A code as a machine sends it: anything printable. */
const sentCode = line(80);

const board = z.object({ side: z.enum(['L', 'R']), n: z.int().check(z.minimum(0), z.maximum(999)) });
const feet = z.number().check(z.minimum(-1000), z.maximum(1000));
export const passBody = z.object({
  direction: z.enum(['outbound', 'return']), fromBoard: board, toBoard: board, loads: z.int().check(z.minimum(0), z.maximum(99)),
  ul: z.int().check(z.minimum(0), z.maximum(10_000)), product: z.enum(['A', 'B']), fromFt: feet, toFt: feet,
  speed: z.optional(z.int().check(z.minimum(1), z.maximum(1000))), rpm: z.optional(z.int().check(z.minimum(1), z.maximum(5000))),
});
export const revisionBody = z.object({
  lengthFt: feet, passes: z.array(passBody).check(z.minLength(1), z.maxLength(60)),
  cleanerZones: z.optional(z.array(z.object({ fromFt: feet, toFt: feet, ulPerFt: z.int().check(z.minimum(0), z.maximum(100_000)), waterParts: z.int().check(z.minimum(0), z.maximum(100)) })).check(z.maxLength(20))),
});
export type RevisionBody = z.infer<typeof revisionBody>;

const capabilities = z.object({
  oils: z.boolean(), cleans: z.boolean(), deckTreatment: z.boolean(), products: z.array(z.enum(['A', 'B'])),
  volume: z.union([z.object({ kind: z.literal('fixed'), ul: z.int() }), z.object({ kind: z.literal('per-load'), minUl: z.int(), maxUl: z.int(), stepUl: z.int() })]),
  headBoards: z.object({ first: z.int(), last: z.int() }), maxLengthFt: z.number(), tailOffFt: z.number(), maxPasses: z.int(), maxLoads: z.int(),
  buffer: z.union([z.object({ speeds: z.array(z.int()) }), z.object({ minRpm: z.int(), maxRpm: z.int() })]),
  travel: z.union([z.object({ speeds: z.array(z.int()) }), z.object({ min: z.int(), max: z.int() })]),
  cleaner: z.union([z.object({ kind: z.literal('premixed'), waterParts: z.int() }), z.object({ kind: z.literal('on-board'), maxWaterParts: z.int(), maxZones: z.int() })]),
  moves: z.enum(['walks', 'is-moved', 'trails-cord']), battery: z.boolean(), patterns: z.enum(['network', 'hand']),
});

const reason = z.object({ code: z.string(), pass: z.optional(z.int()), zone: z.optional(z.int()), params: z.record(z.string(), z.union([z.string(), z.number()])) });
const volume = z.object({ aUl: z.int(), bUl: z.int(), totalUl: z.int() });
export const patternSummary = z.object({ code, name: z.string(), revision: z.int(), lengthFt: z.number(), volume, /** Film by board 1–39 from the left, nL. */ boardsNl: z.array(z.int()), usedBy: z.array(z.string()) });
export const patternDetail = z.extend(patternSummary, {
  revisions: z.array(z.object({
    revision: z.int(), at: instant, by: z.string(), note: z.nullable(z.string()), body: revisionBody, volume,
    passUl: z.array(z.int()), /** Film by board 1–39 from the left, nL. */ boardsNl: z.array(z.int()), /** By foot from the foul line, nL. */ feetNl: z.array(z.int()),
    /** Inside ÷ outside of each side; null where the outside is dry. */ ratio: z.object({ left: z.nullable(z.number()), right: z.nullable(z.number()) }),
    exitBoard: z.nullable(z.number()), machines: z.array(z.object({
      machine: code, name: z.string(), canLay: z.boolean(), reasons: z.array(reason),
      /** What a machine with one volume can lay instead; by board what that is more (or less), µL. `proven`: nothing is nearer. */
      instead: z.nullable(z.object({ totalUl: z.int(), loads: z.array(z.int()), differenceUl: z.array(z.int()), proven: z.boolean() })),
    })),
  })),
});
export type PatternDetail = z.infer<typeof patternDetail>;

export const machineDetail = z.extend(machineView, { capabilities, paceMs: z.nullable(z.number()), lanesDressed: z.int() });
export const runDetail = z.extend(runBar, {
  revision: z.nullable(z.int()), entered: z.enum(['gateway', 'hand']), reason: z.nullable(z.string()), plannedStart: z.nullable(instant),
  outcomes: z.array(z.object({
    lane: laneNumber, outcome: z.enum(['dressed', 'skipped', 'broken-off']), startedAt: z.nullable(instant), finishedAt: z.nullable(instant),
    aUl: z.nullable(z.int()), bUl: z.nullable(z.int()), cleanerUl: z.nullable(z.int()), measured: z.boolean(), reason: z.nullable(z.string()),
  })),
});
export type RunDetail = z.infer<typeof runDetail>;

const because = z.array(z.object({ code: z.string(), params: z.record(z.string(), z.union([z.string(), z.number()])) }));
const tonight = z.object({
  at: instant, /** False: no lane machine is known, or more than three. */ possible: z.boolean(),
  blocks: z.array(z.object({
    id: z.string(), /** Key of the run that somebody planned; null: nobody has yet. */ run: z.nullable(z.string()),
    session: z.nullable(z.object({ id: z.string(), name: z.string(), warmUpAt: instant })), machine: code, pattern: z.string(), revision: z.nullable(z.int()), lanes: z.array(laneNumber),
    startAt: instant, endAt: instant, /** Begun later, `breaksFirst` isn’t ready by its warm-up. */ startBy: z.nullable(instant), breaksFirst: z.nullable(z.string()), freeUnknown: z.array(laneNumber),
  })),
  unplanned: z.array(z.object({ session: z.string(), lanes: z.array(laneNumber), because })),
  /** Tanks that don’t last for what is ahead. */ runsOut: z.array(z.object({ machine: code, store: z.enum(['tankA', 'tankB']), lane: laneNumber, shortUl: z.int() })),
  late: z.array(z.object({ session: z.string(), byMs: z.number(), because })),
  proof: z.object({
    method: z.enum(['exact', 'heuristic']), proven: z.object({ sessionsLate: z.boolean(), lateness: z.boolean(), freshness: z.boolean(), travel: z.boolean() }),
    criteria: z.object({ sessionsLate: z.int(), latenessMs: z.number(), freshnessLostMs: z.number(), travelMs: z.number(), changes: z.int() }), bound: z.object({ sessionsLate: z.int(), latenessMs: z.number() }),
  }),
});
export type TonightView = z.infer<typeof tonight>;

const at = '/api/centres/:centre';
const lanes = z.array(laneNumber).check(z.minLength(1), z.maxLength(99));
const refusedRun = ['machine.unknown', 'pattern.unknown', 'run.lanes-unknown', 'run.lane-twice', 'run.machine-cannot', 'run.code-taken'] as const;
const runParams = z.extend(centreParams, { machine: code, run: sentCode });

export const runContracts = {
  patterns: contract({ id: 'runs.patterns', method: 'GET', path: `${at}/patterns`, permission: 'run.see', summary: 'Patterns with their newest revision', params: centreParams, response: z.object({ patterns: z.array(patternSummary) }) }),
  pattern: contract({
    id: 'runs.pattern', method: 'GET', path: `${at}/patterns/:code`, permission: 'run.see', summary: 'A pattern with its revisions, volumes, film and the machines that can lay it', params: z.extend(centreParams, { code }),
    response: patternDetail, refusals: ['pattern.unknown'],
  }),
  addPattern: contract({
    id: 'runs.addPattern', method: 'POST', path: `${at}/patterns`, permission: 'pattern.edit', summary: 'A new pattern with its first revision', params: centreParams, status: 201,
    body: z.object({ code, name: line(60), note: z.optional(note(300)), revision: revisionBody }), response: patternDetail, refusals: ['pattern.code-taken', 'pattern.invalid'],
  }),
  revise: contract({
    id: 'runs.revise', method: 'POST', path: `${at}/patterns/:code/revisions`, permission: 'pattern.edit', summary: 'A new revision; the ones before never change', params: z.extend(centreParams, { code }), status: 201,
    body: z.object({ note: z.optional(note(300)), revision: revisionBody }), response: patternDetail, refusals: ['pattern.unknown', 'pattern.invalid', 'pattern.unchanged'],
  }),
  machines: contract({ id: 'runs.machines', method: 'GET', path: `${at}/machines`, permission: 'run.see', summary: 'Lane machines: levels, pace, what they can do', params: centreParams, response: z.object({ machines: z.array(machineDetail) }) }),
  addMachine: contract({
    id: 'runs.addMachine', method: 'POST', path: `${at}/machines`, permission: 'settings.edit', summary: 'A new lane machine', params: centreParams, status: 201,
    body: z.object({ code, name: line(60), capabilities }), response: machineDetail, refusals: ['machine.code-taken'],
  }),
  list: contract({
    id: 'runs.list', method: 'GET', path: `${at}/runs`, permission: 'run.see', summary: 'Runs of a business date, and those planned or under way', params: centreParams, query: z.object({ date: z.optional(date) }),
    response: z.object({ date, runs: z.array(runDetail) }), refusals: ['run.date-invalid'],
  }),
  tonight: contract({
    id: 'runs.tonight', method: 'GET', path: `${at}/runs/tonight`, permission: 'run.see', summary: 'What sessions of tonight still want dressed: by which machine, from when, by when at the latest', params: centreParams, response: tonight,
  }),
  plan: contract({
    id: 'runs.plan', method: 'POST', path: `${at}/runs/planned`, permission: 'run.record', summary: 'Plan a run: machine, pattern, lanes in order, start', params: centreParams, status: 201,
    body: z.object({ run: z.optional(line(40)), machine: code, pattern: code, revision: z.optional(z.int()), lanes, startAt: instant }), response: runDetail, refusals: [...refusedRun, 'run.start-past'],
  }),
  record: contract({
    id: 'runs.record', method: 'POST', path: `${at}/runs`, permission: 'run.record', summary: 'Record a run that was made, lane by lane', params: centreParams, status: 201,
    body: z.object({
      run: z.optional(line(40)), machine: code, pattern: z.optional(code), revision: z.optional(z.int()), startedAt: instant, finishedAt: instant,
      lanes: z.array(z.object({ lane: laneNumber, outcome: z.enum(['dressed', 'skipped', 'broken-off']), reason: z.optional(line(200)) })).check(z.minLength(1), z.maxLength(99)),
    }),
    response: runDetail, refusals: [...refusedRun, 'run.end-before-start', 'run.end-in-future', 'run.too-old', 'run.broken-off-twice'],
  }),
  cancel: contract({
    id: 'runs.cancel', method: 'POST', path: `${at}/runs/:machine/:run/cancel`, permission: 'run.record', summary: 'Take back a planned run', params: runParams, body: z.object({ reason: line(200) }),
    response: runDetail, refusals: ['run.unknown', 'run.not-planned'],
  }),
};
