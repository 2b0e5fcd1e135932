import { type Amounts, type LaneUse, willItLast } from './lasting.ts';
import type { PatternRevision } from './pattern.ts';
import { patternVolume } from './volume.ts';

/** Work of a machine in its order: lanes with the pattern that is laid on them. */
export interface Ahead {
  lanes: readonly number[];
  pattern: string | null;
  revision: number | null;
}

/** Conditioner that a machine has told, µL; null: not told. */
export interface Tanks {
  tankA: number | null;
  tankB: number | null;
}

/** A tank runs out before this lane; `shortUl` is what it lacks for it. */
export interface RunsOut {
  machine: string;
  store: 'tankA' | 'tankB';
  lane: number;
  shortUl: number;
}

const usesOf = (work: Ahead, body: PatternRevision | undefined): LaneUse[] => {
  if (!body) return [];
  const { A, B } = patternVolume(body).byProduct;
  const use: Amounts = { tankA: A, tankB: B };
  return work.lanes.map((lane) => ({ lane, use }));
};

/** Which tanks don't last for what is ahead of a machine tonight. A tank that isn't told, or a pattern that isn't known, says nothing. */
export function tanksTonight(machine: string, tanks: Tanks, ahead: readonly Ahead[], revisionOf: (code: string, revision: number | null) => { body: PatternRevision } | undefined): RunsOut[] {
  const lanes = ahead.flatMap((work) => usesOf(work, work.pattern === null ? undefined : revisionOf(work.pattern, work.revision)?.body));
  const told = (['tankA', 'tankB'] as const).flatMap((store) => (tanks[store] === null ? [] : [[store, { level: tanks[store], capacity: tanks[store] }] as const]));
  const { runsOut } = willItLast(Object.fromEntries(told), lanes);
  return told.flatMap(([store]) => {
    const out = runsOut[store];
    return out ? [{ machine, store, lane: out.lane, shortUl: out.short }] : [];
  });
}
