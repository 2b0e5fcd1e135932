import type { Knex } from 'knex';
import type { House } from '#shared/domain/house/state.ts';
import type { Days } from '../days.ts';
import { calls } from './calls.ts';
import { laneOuts, laneStates, laneUses, quarterCounters } from './lanes.ts';
import { keyOf, type Projection, remove, type Row, upsert } from './rows.ts';
import { runLanes, runs } from './runs.ts';

/** Every table that the house is written to. */
export const PROJECTIONS: readonly Projection[] = [laneStates, laneUses, laneOuts, quarterCounters, calls, runs, runLanes];

/** Rows of one table that a unit of work makes new or other, and rows that are no longer true. */
export interface TableChanges {
  projection: Projection;
  written: Row[];
  gone: Row[];
}

interface Pair {
  before: House;
  after: House;
  /** Folded anew from another base: nothing is shared, so rows are compared by what they say. */
  anew: boolean;
}

/** Days that differ, each with what the tables hold of it: of a day that has just begun, its base. */
function pairsOf(before: Days, after: Days): Pair[] {
  return after.flatMap((day) => {
    const old = before.find((d) => d.from === day.from);
    const was = old?.timeline.state ?? day.timeline.base;
    const anew = old !== undefined && old.timeline.base !== day.timeline.base;
    return was === day.timeline.state ? [] : [{ before: was, after: day.timeline.state, anew }];
  });
}

/** What to write so that the tables say what the days after say. A row that spans days is as the last day has it. */
export function changesBetween(before: Days, after: Days): TableChanges[] {
  const pairs = pairsOf(before, after);
  return PROJECTIONS.flatMap((projection) => {
    const old = new Map<string, Row>();
    const written = new Map<string, Row>();
    for (const pair of pairs) {
      for (const row of projection.rows(pair.before, pair.after)) old.set(keyOf(projection, row), row);
      for (const row of projection.rows(pair.after, pair.before)) written.set(keyOf(projection, row), row);
    }
    const gone = [...old].filter(([key]) => !written.has(key)).map(([, row]) => row);
    const anew = pairs.some((pair) => pair.anew);
    const rows = anew ? [...written].filter(([key, row]) => !equal(old.get(key), row)).map(([, row]) => row) : [...written.values()];
    return rows.length + gone.length > 0 ? [{ projection, written: rows, gone }] : [];
  });
}

const equal = (a: Row | undefined, b: Row): boolean => a !== undefined && JSON.stringify(a) === JSON.stringify(b);

export async function writeChanges(trx: Knex.Transaction, centre: Buffer, version: number, changes: readonly TableChanges[]): Promise<void> {
  for (const { projection, written, gone } of changes) {
    await upsert(trx, projection, centre, version, written);
    await remove(trx, projection, centre, gone);
  }
}
