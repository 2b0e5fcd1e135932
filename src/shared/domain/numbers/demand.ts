/**
 * Arguments no caller may pass: these are mistakes in the program, so they throw RangeError with the argument's name.
 * (What is merely unknown, such as no frames yet, is a `Missing` result instead.)
 */
export function demandCount(name: string, value: number): void {
  if (!Number.isInteger(value) || value < 0) throw new RangeError(`${name} must be a whole number of 0 or more, got ${value}`);
}

export function demandAmount(name: string, value: number): void {
  if (!Number.isFinite(value) || value < 0) throw new RangeError(`${name} must be finite and 0 or more, got ${value}`);
}

export function demandPositive(name: string, value: number): void {
  if (!Number.isFinite(value) || value <= 0) throw new RangeError(`${name} must be finite and above 0, got ${value}`);
}

/** A probability or confidence level strictly between 0 and 1. */
export function demandOpenUnit(name: string, value: number): void {
  if (!(value > 0 && value < 1)) throw new RangeError(`${name} must lie strictly between 0 and 1, got ${value}`);
}

/** Arrays that describe the same things, one element each. */
export function demandSameLength(name: string, left: readonly unknown[], right: readonly unknown[]): void {
  if (left.length !== right.length) throw new RangeError(`${name} must have the same length, got ${left.length} and ${right.length}`);
}
