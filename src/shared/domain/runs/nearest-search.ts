/** Least squares over whole numbers: which loads bring Σ loads × unit × column closest to the target? */
export interface NearestProblem {
  /** One column a pass: 1 where it covers the board. */
  columns: readonly (readonly number[])[];
  /** Asked per board, integers. */
  target: readonly number[];
  /** What each pass itself laid a board; decides among equals. */
  own: readonly number[];
  unit: number;
  max: number;
  maxNodes: number;
}

/**
 * Weight of "near to its own volume" beside the profile: small enough that it never outweighs one
 * µL² (60 passes × (9,000 µL)² × 1e-10 < 1), large enough to keep equal ranges apart.
 */
const OWN_WEIGHT = 1e-10;

interface Triangular {
  r: number[][];
  y: number[];
}

const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, value, i) => sum + value * (b[i] ?? 0), 0);

/** QR by modified Gram–Schmidt of the columns with the own-volume rows below: ‖Ax − b‖² = ‖Rx − y‖² + constant. */
function triangular(problem: NearestProblem): Triangular {
  const { columns, target, own, unit } = problem;
  const n = columns.length;
  const weight = Math.sqrt(OWN_WEIGHT);
  const q = columns.map((column, j) => [...column.map((c) => c * unit), ...own.map((_, i) => (i === j ? weight * unit : 0))]);
  let b = [...target, ...own.map((ul) => weight * ul)];
  const r = Array.from({ length: n }, () => new Array<number>(n).fill(0));
  const y: number[] = [];
  for (let j = 0; j < n; j += 1) {
    const column = q[j] ?? [];
    const norm = Math.sqrt(dot(column, column));
    const unitColumn = column.map((value) => value / norm);
    (r[j] ?? [])[j] = norm;
    for (let k = j + 1; k < n; k += 1) {
      const other = q[k] ?? [];
      const along = dot(unitColumn, other);
      (r[j] ?? [])[k] = along;
      q[k] = other.map((value, i) => value - along * (unitColumn[i] ?? 0));
    }
    const along = dot(unitColumn, b);
    y[j] = along;
    b = b.map((value, i) => value - along * (unitColumn[i] ?? 0));
  }
  return { r, y };
}

/** Whole numbers 0…max in the order of their distance from the centre, nearest first. */
function* outward(centre: number, max: number): Generator<number> {
  const start = Math.min(max, Math.max(0, Math.round(centre)));
  yield start;
  let [low, high] = [start - 1, start + 1];
  while (low >= 0 || high <= max) {
    const takeLow = high > max || (low >= 0 && centre - low <= high - centre);
    if (takeLow) yield low--;
    else yield high++;
  }
}

/**
 * Sphere decoding (Schnorr and Euchner's order of enumeration, from memory): depth first from the
 * last pass, each level nearest value first, cut as soon as the partial sum reaches the best so far.
 */
export function searchNearest(problem: NearestProblem): { loads: number[]; proven: boolean } {
  const { r, y } = triangular(problem);
  const n = problem.columns.length;
  const x = new Array<number>(n).fill(0);
  let best = { sum: Infinity, loads: [...x] };
  let nodes = 0;
  const descend = (level: number, sum: number): void => {
    if (level < 0) {
      best = { sum, loads: [...x] };
      return;
    }
    const row = r[level] ?? [];
    const diagonal = row[level] ?? 1;
    let rest = y[level] ?? 0;
    for (let k = level + 1; k < n; k += 1) rest -= (row[k] ?? 0) * (x[k] ?? 0);
    for (const value of outward(rest / diagonal, problem.max)) {
      const gap = rest - diagonal * value;
      const next = sum + gap * gap;
      if (next >= best.sum || nodes >= problem.maxNodes) break;
      nodes += 1;
      x[level] = value;
      descend(level - 1, next);
    }
    x[level] = 0;
  };
  descend(n - 1, 0);
  return { loads: best.loads, proven: nodes < problem.maxNodes };
}
