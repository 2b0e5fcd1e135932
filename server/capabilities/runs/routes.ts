import { runContracts as c } from '#shared/contracts/runs.ts';
import { businessDay, businessDayAt, isDate } from '#shared/domain/business-day.ts';
import type { House } from '#shared/domain/house/state.ts';
import { median } from '#shared/domain/numbers/percentiles.ts';
import { runWith } from '#shared/domain/runs/fold.ts';
import type { Run } from '#shared/domain/runs/state.ts';
import type { Deps } from '#server/deps.ts';
import { personOf } from '#server/platform/http/person.ts';
import { invalid, notFound } from '#server/platform/http/refusal.ts';
import { type CentreRef, type Route, serve } from '#server/platform/http/route.ts';
import type { HouseAt } from '#server/platform/journal/ledger.ts';
import { cancelRun, planRun, recordRun } from './commands.ts';
import type { createLibraries, Library } from './library.ts';
import { machineLevels } from './machines.ts';
import { addMachine, addPattern, revisePattern } from './patterns.ts';
import { lanesDressed, runByCode, runsWithin } from './read-model.ts';
import { tonightView, type WantsOfNight } from './tonight.ts';
import { patternSummary, revisionView, runDetail } from './view.ts';

type Libraries = ReturnType<typeof createLibraries>;
type RunsDeps = Pick<Deps, 'db' | 'ledger'>;
/** What runs ask of the slices that want lanes dressed; compose.ts joins their front doors to it. */
export interface RunsSources {
  /** Names of the leagues that want a pattern, by its code. */
  usedBy: (centre: CentreRef) => Promise<Map<string, string[]>>;
  wants: WantsOfNight;
}

export const runsRoutes = (deps: RunsDeps, libraries: Libraries, sources: RunsSources): Route[] => [
  ...patternRoutes(deps, libraries, sources.usedBy), ...machineRoutes(deps, libraries), ...runRoutes(deps, libraries, sources.wants),
];

function patternRoutes({ ledger }: RunsDeps, libraries: Libraries, usedBy: RunsSources['usedBy']): Route[] {
  const detail = async (centre: CentreRef, code: string) => {
    const library = await libraries.of(centre);
    const pattern = library.patterns.find((p) => p.code === code);
    const revisions = library.revisions.filter((r) => r.code === code);
    const newest = revisions.at(-1);
    if (!pattern || !newest) throw notFound('pattern.unknown', { pattern: code });
    const used = (await usedBy(centre)).get(code) ?? [];
    return { ...patternSummary(pattern, newest, used), revisions: revisions.toReversed().map((r) => revisionView(r, library)) };
  };
  return [
    serve(c.patterns, async ({ centre }) => {
      const [library, used] = [await libraries.of(centre), await usedBy(centre)];
      return { patterns: library.patterns.flatMap((p) => {
        const newest = library.revisions.findLast((r) => r.code === p.code);
        return newest ? [patternSummary(p, newest, used.get(p.code) ?? [])] : [];
      }) };
    }),
    serve(c.pattern, ({ centre, params }) => detail(centre, params.code)),
    serve(c.addPattern, async ({ centre, body, actor }) => {
      await addPattern(ledger, centre, { code: body.code, name: body.name, note: body.note ?? null, revision: body.revision, by: personOf(actor).name });
      libraries.forget(centre);
      return detail(centre, body.code);
    }),
    serve(c.revise, async ({ centre, params, body, actor }) => {
      await revisePattern(ledger, centre, { code: params.code, note: body.note ?? null, revision: body.revision, by: personOf(actor).name });
      libraries.forget(centre);
      return detail(centre, params.code);
    }),
  ];
}

function machineRoutes({ db, ledger }: RunsDeps, libraries: Libraries): Route[] {
  const machines = async (centre: CentreRef) => {
    const [library, { state }, dressed] = await Promise.all([libraries.of(centre), ledger.read(centre), lanesDressed(db, centre.id)]);
    return library.machines.map((machine) => ({
      ...machineLevels(machine, state), capabilities: copy(machine.capabilities),
      paceMs: median(state.runs.paces[machine.code] ?? []).value, lanesDressed: dressed.get(machine.code) ?? 0,
    }));
  };
  return [
    serve(c.machines, async ({ centre }) => ({ machines: await machines(centre) })),
    serve(c.addMachine, async ({ centre, body }) => {
      await addMachine(ledger, centre, body);
      libraries.forget(centre);
      const added = (await machines(centre)).find((m) => m.code === body.code);
      if (!added) throw notFound('machine.unknown', { machine: body.code });
      return added;
    }),
  ];
}

/** The record's arrays are read-only in the domain; an answer has its own. */
const copy = <T>(value: T): never => structuredClone(value) as never;

function runRoutes({ db, ledger }: RunsDeps, libraries: Libraries, wants: WantsOfNight): Route[] {
  const shown = async (centre: CentreRef, state: House, machine: string, run: string) => {
    const found = runWith(state.runs, machine, run) ?? (await runByCode(db, centre.id, machine, run));
    if (!found) throw notFound('run.unknown');
    return runDetail(found, state.runs, await libraries.of(centre));
  };
  /** Decides with the library as it is and the run that has the code already, if one has; answers with the run. */
  const decide = async (
    centre: CentreRef, { machine, run }: { machine: string; run?: string },
    make: (house: HouseAt, library: Library, now: number, earlier: Run | null) => { decision: ReturnType<typeof cancelRun>; run: string },
  ) => {
    const library = await libraries.of(centre);
    let code = '';
    const after = await ledger.decide(centre, async (house, now, trx) => {
      const made = make(house, library, now, run === undefined ? null : await runByCode(trx, centre.id, machine, run));
      code = made.run;
      return made.decision;
    });
    return shown(centre, after.state, machine, code);
  };
  return [
    serve(c.list, async ({ centre, query, now }) => {
      if (query.date !== undefined && !isDate(query.date)) throw invalid('run.date-invalid', '/date');
      const day = query.date === undefined ? businessDayAt(now, centre.zone, centre.cut) : businessDay(query.date, centre.zone, centre.cut);
      const [past, { state }, library] = await Promise.all([runsWithin(db, centre.id, day.from, day.to), ledger.read(centre), libraries.of(centre)]);
      const live = query.date === undefined ? Object.values(state.runs.active).filter((r) => !past.some((p) => p.key === r.key)) : [];
      const begin = (run: (typeof past)[number]): number => run.startedAt ?? run.plannedStart ?? run.lastAt;
      return { date: day.date, runs: [...past, ...live].sort((a, b) => begin(a) - begin(b)).map((run) => runDetail(run, state.runs, library)) };
    }),
    serve(c.tonight, async ({ centre, now }) => {
      const [{ state }, library] = await Promise.all([ledger.read(centre), libraries.of(centre)]);
      return tonightView(state, library, await wants(centre, state, now), now);
    }),
    serve(c.plan, ({ centre, body, actor }) => decide(centre, body, (house, library, now, earlier) => planRun(house, library, body, personOf(actor), now, earlier))),
    serve(c.record, ({ centre, body, actor }) => decide(centre, body, (house, library, now, earlier) => recordRun(house, library, body, personOf(actor), now, earlier))),
    serve(c.cancel, ({ centre, params, body, actor }) => decide(centre, params, (house, _library, _now, earlier) => ({
      decision: cancelRun(house, params.machine, params.run, body.reason, personOf(actor), earlier), run: params.run,
    }))),
  ];
}
