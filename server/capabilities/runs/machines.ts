import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Machine } from './store.ts';

const ml = (ul: number | null | undefined): number | null => (ul === null || ul === undefined ? null : ul / 1000);

/** A machine with its levels as last heard. */
export function machineLevels(machine: Pick<Machine, 'code' | 'name'>, house: House): FloorSnapshot['machines'][number] {
  const levels = house.runs.levels[machine.code];
  return {
    code: machine.code, name: machine.name, tankAMl: ml(levels?.tankAUl), tankBMl: ml(levels?.tankBUl), cleanerMl: ml(levels?.cleanerUl),
    wasteMl: ml(levels?.wasteUl), batteryPct: levels?.batteryPct ?? null, at: levels?.at ?? null,
  };
}
