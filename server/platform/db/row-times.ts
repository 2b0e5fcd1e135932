/**
 * DATETIME(3) at the border of the database: rows carry Dates in UTC, the
 * domain epoch milliseconds. Stores convert here and nowhere else.
 */

/** Epoch ms to a value for a DATETIME(3) column; null stays null. */
export function toRowTime(at: number): Date;
export function toRowTime(at: number | null): Date | null;
export function toRowTime(at: number | null): Date | null {
  return at === null ? null : new Date(at);
}

/** A DATETIME(3) column to epoch ms; null stays null. */
export function fromRowTime(value: Date): number;
export function fromRowTime(value: Date | null): number | null;
export function fromRowTime(value: Date | null): number | null {
  return value === null ? null : value.getTime();
}
