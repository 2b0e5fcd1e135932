/**
 * A figure that can't be given, and why. Every function of this folder answers with its figures or with this,
 * never with NaN and never with a zero that stands for "unknown".
 */
export type Missing<Reason extends string = string> = { value: null; reason: Reason };

export function missing<Reason extends string>(reason: Reason): Missing<Reason> {
  return { value: null, reason };
}

export function isMissing(result: unknown): result is Missing {
  return typeof result === 'object' && result !== null && 'reason' in result && 'value' in result && result.value === null;
}
