import { median } from '../numbers/percentiles.ts';
import type { RunsState } from './state.ts';

/** Time a lane, with the move to the next, of a machine that has shown no pace of its own yet, ms (common practice: 1.5 to 2.5 minutes). */
export const USUAL_PACE_MS = 2 * 60_000;

/** Time a lane of a machine, with moves, in whole ms: the median of its own recent lanes, or the usual one. */
export const paceOf = (runs: Pick<RunsState, 'paces'>, machine: string, usualMs: number = USUAL_PACE_MS): number => Math.round(median(runs.paces[machine] ?? []).value ?? usualMs);
