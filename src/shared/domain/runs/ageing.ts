/** Settings of a centre; hours may have fractions. */
export interface AgeingSettings {
  freshDeliveries: number;
  freshHours: number;
  wornDeliveries: number;
  wornHours: number;
  /** Deliveries by others that a league asking for fresh lanes still accepts (a mechanic's test balls). */
  freshTolerance: number;
}

/** Common practice; every centre may change them. */
export const DEFAULT_AGEING: AgeingSettings = { freshDeliveries: 100, freshHours: 4, wornDeliveries: 500, wornHours: 24, freshTolerance: 5 };

/** Since the lane was dressed; null is "nobody counts" or "nobody knows when". */
export interface FilmAge {
  deliveries: number | null;
  hours: number | null;
}

/** `ageing` lies between fresh and worn; `unknown` when the time of dressing isn't known. */
export type Freshness = 'fresh' | 'ageing' | 'worn' | 'unknown';

export const HOUR_MS = 3_600_000;

/** Hours between two instants (ms), never below 0. */
export const hoursBetween = (fromMs: number, toMs: number): number => Math.max(0, toMs - fromMs) / HOUR_MS;

/** Fresh: few deliveries and young. Worn: many or old. Without a counter, by hours alone. */
export function freshness(age: FilmAge, settings: AgeingSettings = DEFAULT_AGEING): Freshness {
  if (age.deliveries !== null && age.deliveries > settings.wornDeliveries) return 'worn';
  if (age.hours === null) return 'unknown';
  if (age.hours > settings.wornHours) return 'worn';
  const few = age.deliveries === null || age.deliveries <= settings.freshDeliveries;
  return few && age.hours <= settings.freshHours ? 'fresh' : 'ageing';
}

/** A league that asks for fresh: at most the tolerance rolled by others since dressing; null when nobody counts. */
export function meetsFreshDemand(deliveriesByOthers: number | null, settings: AgeingSettings = DEFAULT_AGEING): boolean | null {
  return deliveriesByOthers === null ? null : deliveriesByOthers <= settings.freshTolerance;
}

export interface StrengthEstimate {
  /** 1 just dressed, towards 0; null when the time of dressing isn't known. */
  strength: number | null;
  estimate: true;
}

/**
 * Film strength as an estimate: it halves for every worn-limit of deliveries and for every worn-limit
 * of hours, 2^−(deliveries/wornDeliveries + hours/wornHours). A film at one limit is drawn half as
 * strong. No measured curve stands behind it, so every screen that shows it says "estimate".
 */
export function filmStrength(age: FilmAge, settings: AgeingSettings = DEFAULT_AGEING): StrengthEstimate {
  if (age.hours === null) return { strength: null, estimate: true };
  const worn = (age.deliveries ?? 0) / settings.wornDeliveries + age.hours / settings.wornHours;
  return { strength: 2 ** -worn, estimate: true };
}
