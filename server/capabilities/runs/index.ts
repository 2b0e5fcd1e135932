import type { FloorSnapshot, RunBar } from '#shared/contracts/floor.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { MachineCapability } from '#shared/domain/runs/capability.ts';
import type { PatternRevision } from '#shared/domain/runs/pattern.ts';
import type { Deps } from '#server/deps.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import { createLibraries, type Library, revisionIn } from './library.ts';
import { machineLevels } from './machines.ts';
import { addMachine, addPattern, revisePattern } from './patterns.ts';
import { type RunsSources, runsRoutes } from './routes.ts';
import { runBar } from './view.ts';

export { revisionIn } from './library.ts';
export type { Library } from './library.ts';

export interface Runs {
  routes: Route[];
  readLibrary(centre: CentreRef): Promise<Library>;
  /** Length of a revision, and whether the centre knows it. */
  patterns(centre: CentreRef): Promise<(code: string, revision: number | null) => { lengthFt: number; verified: boolean } | undefined>;
  machines(centre: CentreRef, house: House): Promise<FloorSnapshot['machines']>;
  /** Runs planned, under way and ended since the day's cut. */
  bars(centre: CentreRef, house: House, now: number): Promise<RunBar[]>;
  addMachine(centre: CentreRef, machine: { code: string; name: string; capabilities: MachineCapability }): Promise<void>;
  addPattern(centre: CentreRef, pattern: { code: string; name: string; revision: PatternRevision; by: string }): Promise<void>;
  revisePattern(centre: CentreRef, pattern: { code: string; revision: PatternRevision; by: string }): Promise<void>;
}

/** Patterns, lane machines and runs. */
export function createRuns(deps: Pick<Deps, 'db' | 'ledger'>, sources: RunsSources): Runs {
  const libraries = createLibraries(deps.db);
  const changed = async (centre: CentreRef, change: Promise<void>): Promise<void> => {
    await change;
    libraries.forget(centre);
  };
  const body = (revision: PatternRevision) => ({ ...revision, passes: revision.passes.map((p) => ({ ...p })), cleanerZones: revision.cleanerZones?.map((z) => ({ ...z })) });
  return {
    routes: runsRoutes(deps, libraries, sources),
    readLibrary: (centre) => libraries.of(centre),
    async patterns(centre) {
      const library = await libraries.of(centre);
      return (code, revision) => {
        const found = revisionIn(library, code, revision);
        return found && { lengthFt: found.body.lengthFt, verified: revision !== null };
      };
    },
    async machines(centre, house) {
      return (await libraries.of(centre)).machines.map((machine) => machineLevels(machine, house));
    },
    async bars(centre, house, now) {
      const library = await libraries.of(centre);
      const day = businessDayAt(now, centre.zone, centre.cut);
      const ended = house.runs.ended.filter((r) => (r.endedAt ?? r.lastAt) >= day.from);
      return [...ended, ...Object.values(house.runs.active)].map((run) => runBar(run, house.runs, library));
    },
    addMachine: (centre, machine) => changed(centre, addMachine(deps.ledger, centre, machine)),
    addPattern: (centre, { revision, ...pattern }) => changed(centre, addPattern(deps.ledger, centre, { ...pattern, note: null, revision: body(revision) })),
    revisePattern: (centre, { revision, ...pattern }) => changed(centre, revisePattern(deps.ledger, centre, { ...pattern, note: null, revision: body(revision) })),
  };
}
