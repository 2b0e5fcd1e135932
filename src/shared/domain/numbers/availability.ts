import { demandAmount } from './demand.ts';
import { missing, type Missing } from './missing.ts';

/** One failure's times in one unit. `down`: failure to restored, delays included; `waiting`: the part in which nobody worked on it. */
export type Restoration = { down: number; waiting: number };

export type Availability = {
  /** Up time ÷ failures: operating time between failures. Clock: the required time less down time. Null without a failure. */
  mtbf: number | null;
  /** Mean down time, failure to restored, waiting included (MDT; also the standard's mean time *to restoration*). Null without a failure. */
  mdt: number | null;
  /** Mean active repair time: waiting excluded. Null without a failure. */
  activeRepair: number | null;
  up: number;
  down: number;
  /** up ÷ required: waiting counts against it. 0…1. */
  operational: number;
  /** mtbf ÷ (mtbf + active repair): what machine and hands would give without waiting. Null without a failure. */
  inherent: number | null;
};

/**
 * Availability over a required time (the clock: every moment in which the lane was wanted in service, standby included).
 * Terms after IEC 60050-192 (down time 192-02-21, availability 192-01-23); inherent and operational as in
 * the NASA Systems Engineering Handbook.
 * Down times must not overlap (pass the lengths of a union) and not exceed the required time; one unit throughout.
 * @throws RangeError for negative times, waiting above down, or more down time than required time.
 */
export function availability(required: number, restorations: readonly Restoration[]): Availability | Missing<'no-required-time'> {
  demandAmount('required', required);
  let down = 0;
  let waiting = 0;
  for (const one of restorations) {
    demandAmount('down', one.down);
    demandAmount('waiting', one.waiting);
    if (one.waiting > one.down) throw new RangeError('waiting can not exceed down');
    down += one.down;
    waiting += one.waiting;
  }
  if (down > required) throw new RangeError('down time can not exceed the required time');
  if (required === 0) return missing('no-required-time');
  const n = restorations.length;
  const up = required - down;
  const working = up + down - waiting;
  return {
    mtbf: n === 0 ? null : up / n,
    mdt: n === 0 ? null : down / n,
    activeRepair: n === 0 ? null : (down - waiting) / n,
    up,
    down,
    operational: up / required,
    inherent: n === 0 || working === 0 ? null : up / working,
  };
}

/** Steady-state availability from mean up (or operating) time and mean time to restoration, one unit. */
export function steadyStateAvailability(meanUp: number, meanDown: number): { value: number } | Missing<'no-time'> {
  demandAmount('meanUp', meanUp);
  demandAmount('meanDown', meanDown);
  return meanUp + meanDown === 0 ? missing('no-time') : { value: meanUp / (meanUp + meanDown) };
}
