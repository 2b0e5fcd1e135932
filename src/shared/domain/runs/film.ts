import { BOARDS, boardIndex, boardsCovered, type Direction, type Pass, type PatternRevision, type Product } from './pattern.ts';
import { splitByWeights } from './film-split.ts';

/** nL of one direction and product, row by row: `cells[row * 39 + (board − 1)]`. */
export interface FilmLayer {
  direction: Direction;
  product: Product;
  cells: Int32Array;
}

/** The film as laid: 39 boards × the pattern's length. Row 0 begins at the foul line. */
export interface FilmMap {
  stepFt: number;
  rows: number;
  layers: FilmLayer[];
}

/**
 * How a load lies along its feet.
 * `even`: every board of the pass gets the same amount on every foot. This is the default, and what
 * the trade's sheets draw.
 * `crossing`: the head crosses the boards once a load while the machine travels at constant speed;
 * the crossings share the pass's feet equally and run to and fro, the first from left to right, and a
 * drop lies where the head was. Assumed: both speeds constant, no smear by the buffer.
 */
export type FilmModel = 'even' | 'crossing';

export interface FilmOptions {
  /** Feet a row, in tenths; default 1 ft. */
  stepFt?: number;
  model?: FilmModel;
}

const NL_PER_UL = 1000;
const tenths = (ft: number): number => Math.round(ft * 10);

interface Stretch {
  /** In hundred-thousandths of a foot, so that crossings stay integers. */
  from: number;
  to: number;
}
const FINE = 10_000;

/** Weight of each row = what of the stretch lies in it, integers. */
function rowWeights(stretch: Stretch, rows: number, step: number): number[] {
  const weights: number[] = new Array<number>(rows).fill(0);
  const first = Math.max(0, Math.floor(stretch.from / step));
  for (let row = first; row < rows && row * step < stretch.to; row += 1) {
    weights[row] = Math.min(stretch.to, (row + 1) * step) - Math.max(stretch.from, row * step);
  }
  return weights;
}

const add = (cells: Int32Array, row: number, board: number, nl: number): void => {
  const at = row * BOARDS + board - 1;
  cells[at] = (cells[at] ?? 0) + nl;
};

function layEven(pass: Pass, span: Stretch, rows: number, step: number, cells: Int32Array): void {
  const nl = splitByWeights(pass.loads * pass.ul * NL_PER_UL, rowWeights(span, rows, step));
  const last = boardIndex(pass.toBoard);
  nl.forEach((amount, row) => {
    if (amount === 0) return;
    for (let board = boardIndex(pass.fromBoard); board <= last; board += 1) add(cells, row, board, amount);
  });
}

function layCrossing(pass: Pass, span: Stretch, rows: number, step: number, cells: Int32Array): void {
  const count = boardsCovered(pass);
  const drops = pass.loads * count;
  const edge = (drop: number): number => Math.round(((span.to - span.from) * drop) / drops);
  const back = pass.direction === 'return';
  for (let drop = 0; drop < drops; drop += 1) {
    const [near, far] = [edge(drop), edge(drop + 1)];
    const stretch = back ? { from: span.to - far, to: span.to - near } : { from: span.from + near, to: span.from + far };
    const inCrossing = drop % count;
    const leftToRight = Math.floor(drop / count) % 2 === 0;
    const board = boardIndex(pass.fromBoard) + (leftToRight ? inCrossing : count - 1 - inCrossing);
    splitByWeights(pass.ul * NL_PER_UL, rowWeights(stretch, rows, step)).forEach((amount, row) => {
      if (amount !== 0) add(cells, row, board, amount);
    });
  }
}

/**
 * The map of a valid revision (rules.ts), integers in nL, outbound and return and products apart.
 * Amounts that don't divide are split by largest remainder: the map's sum is the passes' sum exactly.
 */
export function filmMap(revision: Pick<PatternRevision, 'lengthFt' | 'passes'>, options: FilmOptions = {}): FilmMap {
  const step = Math.max(1, tenths(options.stepFt ?? 1));
  const reach = Math.max(tenths(revision.lengthFt), ...revision.passes.map((pass) => tenths(Math.max(pass.fromFt, pass.toFt))));
  const rows = Math.max(1, Math.ceil(reach / step));
  const layers: FilmLayer[] = [];
  const lay = options.model === 'crossing' ? layCrossing : layEven;
  for (const pass of revision.passes) {
    if (pass.loads * pass.ul * boardsCovered(pass) === 0) continue;
    let layer = layers.find((known) => known.direction === pass.direction && known.product === pass.product);
    if (!layer) {
      layer = { direction: pass.direction, product: pass.product, cells: new Int32Array(rows * BOARDS) };
      layers.push(layer);
    }
    const [a, b] = [tenths(pass.fromFt) * FINE, tenths(pass.toFt) * FINE];
    lay(pass, { from: Math.min(a, b), to: Math.max(a, b) }, rows, step * FINE, layer.cells);
  }
  return { stepFt: step / 10, rows, layers };
}

/** Which layers to look at; both left out: all of them together. */
export interface FilmFilter {
  direction?: Direction;
  product?: Product;
}

/** The chosen layers added up, nL, laid out as in a layer. */
export function filmCells(map: FilmMap, filter: FilmFilter = {}): Int32Array {
  const sum = new Int32Array(map.rows * BOARDS);
  for (const layer of map.layers) {
    if (filter.direction && layer.direction !== filter.direction) continue;
    if (filter.product && layer.product !== filter.product) continue;
    layer.cells.forEach((nl, i) => {
      sum[i] = (sum[i] ?? 0) + nl;
    });
  }
  return sum;
}

/** nL per board 1–39 over the whole length (index 0 is board 1). */
export function boardProfile(map: FilmMap, filter: FilmFilter = {}): number[] {
  const profile = new Array<number>(BOARDS).fill(0);
  filmCells(map, filter).forEach((nl, i) => {
    profile[i % BOARDS] = (profile[i % BOARDS] ?? 0) + nl;
  });
  return profile;
}

/** nL per row over all boards, foul line first. */
export function footProfile(map: FilmMap, filter: FilmFilter = {}): number[] {
  const profile = new Array<number>(map.rows).fill(0);
  filmCells(map, filter).forEach((nl, i) => {
    const row = Math.floor(i / BOARDS);
    profile[row] = (profile[row] ?? 0) + nl;
  });
  return profile;
}

/** Everything on the lane, nL. */
export const filmTotal = (map: FilmMap, filter: FilmFilter = {}): number => filmCells(map, filter).reduce((sum, nl) => sum + nl, 0);
