import type { LaneReadinessView } from '#shared/contracts/readiness.ts';
import { type CheckName, type LaneMark, markOf, rankOf } from '#shared/domain/readiness/check.ts';
import { checkCell, type Clock, waitsForText } from '#shared/text/en/readiness.ts';

type Check = LaneReadinessView['checks'][number];
export type Column = 'pattern' | 'free' | 'pinsetter' | 'other';

/** Checks that share a column; the worst of them is what it says. */
const OF_COLUMN: Record<Column, readonly CheckName[]> = {
  pattern: ['pattern', 'run-complete', 'machine'], free: ['lane-free'], pinsetter: ['pinsetter', 'repeated-stops'], other: ['other-equipment', 'bumpers', 'certificate'],
};
export const COLUMNS: readonly Column[] = ['pattern', 'free', 'pinsetter', 'other'];

export interface Cell {
  text: string;
  mark: LaneMark;
}

const worst = (checks: readonly Check[]): Check | undefined => [...checks].sort((a, b) => rankOf(markOf(b)) - rankOf(markOf(a)))[0];

/** What a column says of a lane; null where the centre ignores all its checks. */
export function cellOf(lane: LaneReadinessView, column: Column, clock: Clock): Cell | null {
  const check = worst(lane.checks.filter((one) => OF_COLUMN[column].includes(one.check)));
  return check ? { text: checkCell(check, clock), mark: markOf(check) } : null;
}

/** The one thing to say of a lane where there is room for one: its worst check, or its film when all is well. */
export function headline(lane: LaneReadinessView, clock: Clock): Cell {
  const check = worst(lane.checks);
  return check ? { text: checkCell(check, clock), mark: markOf(check) } : { text: '', mark: 'ok' };
}

/** Whom or what a lane waits for, the worst first, each once. */
export function waitsFor(lane: LaneReadinessView): string {
  const waiting = [...lane.checks].filter((check) => markOf(check) !== 'ok' && check.waitsFor !== null).sort((a, b) => rankOf(markOf(b)) - rankOf(markOf(a)));
  return [...new Set(waiting.map(waitsForText))].join(', ');
}
