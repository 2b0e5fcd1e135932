import { median } from '../numbers/percentiles.ts';
import type { RunsState } from './state.ts';

/** Two minutes a lane, moves included, until a machine has shown its own pace (1.5 to 2.5 is common). */
export const USUAL_LANE_MS = 120_000;
/** Lanes seen before a machine's own median replaces the usual time. */
export const LANES_SEEN = 8;

/** Time a lane of one machine, with moves, in whole ms: its own median, or the usual time while too few lanes are known. */
export const laneTimeMs = (seen: readonly number[], usualMs: number = USUAL_LANE_MS): number =>
  Math.round(seen.length < LANES_SEEN ? usualMs : (median(seen).value ?? usualMs));

/** The same of a machine in a house. */
export const paceOf = (runs: Pick<RunsState, 'paces'>, machine: string, usualMs?: number): number => laneTimeMs(runs.paces[machine] ?? [], usualMs);
