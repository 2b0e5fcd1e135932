import type { PatternDetail, RunDetail } from '#shared/contracts/runs.ts';
import type { RunBar } from '#shared/contracts/floor.ts';
import { cannotLay, type MachineCapability } from '#shared/domain/runs/capability.ts';
import { exitBoard, filmRatio } from '#shared/domain/runs/film-facts.ts';
import { boardProfile, filmMap, footProfile } from '#shared/domain/runs/film.ts';
import { paceOf } from '#shared/domain/runs/lane-time.ts';
import type { PatternRevision } from '#shared/domain/runs/pattern.ts';
import type { Run, RunsState } from '#shared/domain/runs/state.ts';
import { substituteFor } from '#shared/domain/runs/substitute.ts';
import { patternVolume } from '#shared/domain/runs/volume.ts';
import { type Library, revisionIn } from './library.ts';
import type { Pattern, Revision } from './store.ts';

const volumeView = (revision: PatternRevision) => {
  const volume = patternVolume(revision);
  return { aUl: volume.byProduct.A, bUl: volume.byProduct.B, totalUl: volume.totalUl };
};

export function patternSummary(pattern: Pattern, newest: Revision, usedBy: string[]) {
  return { code: pattern.code, name: pattern.name, revision: newest.revision, lengthFt: newest.body.lengthFt, volume: volumeView(newest.body), boardsNl: boardProfile(filmMap(newest.body)), usedBy };
}

function insteadOf(machine: MachineCapability, body: PatternRevision): PatternDetail['revisions'][number]['machines'][number]['instead'] {
  const nearest = substituteFor(machine, body);
  return nearest && { totalUl: patternVolume(nearest.revision).totalUl, loads: nearest.revision.passes.map((pass) => pass.loads), differenceUl: nearest.differenceUl, proven: nearest.proven };
}

/** A revision with all that is computed from it: volumes, film by board and foot, ratio, exit board, who can lay it. */
export function revisionView(revision: Revision, library: Library): PatternDetail['revisions'][number] {
  const { body } = revision;
  const map = filmMap(body);
  const boards = boardProfile(map);
  const ratio = filmRatio(boards);
  return {
    revision: revision.revision, at: revision.at, by: revision.by, note: revision.note, volume: volumeView(body), passUl: patternVolume(body).byPass,
    body: { lengthFt: body.lengthFt, passes: body.passes.map((p) => ({ ...p })), cleanerZones: body.cleanerZones?.map((z) => ({ ...z })) },
    boardsNl: boards, feetNl: footProfile(map), ratio: { left: ratio.left, right: ratio.right }, exitBoard: exitBoard(body.lengthFt),
    machines: library.machines.map((machine) => {
      const reasons = cannotLay(machine.capabilities, body, { oil: true, clean: false, deckTreatment: false });
      return { machine: machine.code, name: machine.name, canLay: reasons.length === 0, reasons, instead: insteadOf(machine.capabilities, body) };
    }),
  };
}

/** A run as its bar: planned and running ones end when the machine's own pace says. */
export function runBar(run: Run, runs: RunsState, library: Library): RunBar {
  const lanes = run.lanes ?? run.done.map((d) => d.lane);
  const left = lanes.filter((lane) => !run.done.some((d) => d.lane === lane));
  const active = run.status === 'planned' || run.status === 'under-way';
  const startAt = run.startedAt ?? run.plannedStart;
  const since = Math.max(startAt ?? 0, ...run.done.map((d) => d.finishedAt ?? 0));
  const forecast = startAt === null ? null : since + left.length * paceOf(runs, run.machine);
  return {
    key: run.key, run: run.run, machine: run.machine, status: run.status, pattern: run.pattern,
    verified: run.pattern !== null && revisionIn(library, run.pattern, run.revision) !== undefined,
    lanes, done: run.done.filter((d) => d.outcome === 'dressed').length, startAt, endAt: active ? forecast && Math.round(forecast) : run.endedAt,
    forecast: active, laneNow: run.status === 'under-way' ? (left[0] ?? null) : null,
  };
}

export const runDetail = (run: Run, runs: RunsState, library: Library): RunDetail => ({
  ...runBar(run, runs, library), revision: run.revision, entered: run.entered, reason: run.reason, plannedStart: run.plannedStart,
  outcomes: run.done.map((d) => ({ ...d })),
});
