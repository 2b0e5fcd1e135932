/** Reads that are in range by construction; one function a kind of array keeps the inner loops fast. */
export const i32 = (cells: Int32Array, at: number): number => cells[at] as number;
export const f64 = (cells: Float64Array, at: number): number => cells[at] as number;

/** Element that must exist; an index outside is a defect of the caller. */
export function at<T>(list: readonly T[], index: number): T {
  const value = list[index];
  if (value === undefined) throw new RangeError(`no element ${index} of ${list.length}`);
  return value;
}
