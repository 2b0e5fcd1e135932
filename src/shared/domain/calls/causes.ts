import type { Equipment, SafetyKind } from '../equipment.ts';
import { AREAS_OF, AREAS_OF_ALL, type CauseArea, type CauseCode, type CauseCounts, CAUSES, type CauseFamily } from './causes-list.ts';

export interface Cause {
  code: CauseCode;
  area: CauseArea;
  family: CauseFamily;
  counts: CauseCounts;
  /** Metal has met pins: all pins in that machine want an inspection. */
  pinDamage: boolean;
  /** Mending it means reaching in. */
  lockout: boolean;
}

/** Family of a lane's pinsetter; null where the centre has not said. */
export type Family = 'free-fall' | 'string' | null;

const list: readonly Cause[] = CAUSES.map((row) => ({ ...row, pinDamage: 'pinDamage' in row, lockout: 'lockout' in row }));
const byCode: ReadonlyMap<string, Cause> = new Map(list.map((cause) => [cause.code, cause]));

/** A cause by its code; null for a code that isn't in the list. */
export const causeOf = (code: string): Cause | null => byCode.get(code) ?? null;

const fits = (cause: Cause, family: Family): boolean => cause.family === 'both' || family === null || cause.family === family;

/** May a call on a machine of this family be cleared with this code? Any area: what was called in may not be what it was. */
export function mayBeCause(code: string, family: Family): boolean {
  const cause = causeOf(code);
  return cause !== null && fits(cause, family);
}

/** Causes offered first for a call: the equipment's own areas, then bowler, foreign object and other. A danger has its own. */
export function causesFor(equipment: Equipment, safety: SafetyKind | null, family: Family): Cause[] {
  const areas: readonly CauseArea[] = safety ? ['danger'] : [...AREAS_OF[equipment], ...AREAS_OF_ALL];
  return areas.flatMap((area) => list.filter((cause) => cause.area === area && fits(cause, family)));
}

/** Areas and, within each, causes: most frequent first as `times` (code → how often here) says; else in the order given. */
export function rankCauses(causes: readonly Cause[], times: Readonly<Record<string, number>>): { area: CauseArea; causes: Cause[] }[] {
  const often = (cause: Cause): number => times[cause.code] ?? 0;
  const areas = new Map<CauseArea, Cause[]>();
  for (const cause of causes) areas.set(cause.area, [...(areas.get(cause.area) ?? []), cause]);
  const sum = (group: readonly Cause[]): number => group.reduce((all, cause) => all + often(cause), 0);
  return [...areas]
    .map(([area, group]) => ({ area, causes: group.toSorted((a, b) => often(b) - often(a)) }))
    .toSorted((a, b) => sum(b.causes) - sum(a.causes));
}

/** How a cleared call counts in the rates; a cause that is no longer in the list counts as the machine's own. */
export const countsAs = (code: string): CauseCounts => causeOf(code)?.counts ?? 'machine-stop';
