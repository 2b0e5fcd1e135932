/** Where the lanes stand: pure arithmetic in CSS px, so that it can be shown that no two marks overlap. */

export interface StripPlace {
  lane: number;
  x: number;
  width: number;
}
export interface ReturnPlace {
  /** Odd lane of the pair whose ball return this is. */
  pair: number;
  x: number;
  width: number;
}
export interface Bank {
  strips: StripPlace[];
  returns: ReturnPlace[];
}
export interface BoardLayout {
  banks: Bank[];
  strip: number;
  /** Width that the widest bank takes. */
  width: number;
}

export interface Limits {
  /** A strip is never narrower: the house breaks into banks at a pair instead. */
  minStrip: number;
  maxStrip: number;
  /** Between the lanes of a pair, where the ball return stands, and between pairs, as shares of a strip's width. */
  inner: number;
  outer: number;
}
export const DESK: Limits = { minStrip: 26, maxStrip: 92, inner: 0.14, outer: 0.34 };
/** On the wall two narrow figures of 79 px height (94 px wide in Archivo at width 62) stand on a strip. */
export const WALL: Limits = { minStrip: 96, maxStrip: 150, inner: 0.1, outer: 0.15 };

const innerOf = (strip: number, limits: Limits): number => Math.round(Math.min(16, Math.max(5, strip * limits.inner)));
const outerOf = (strip: number, limits: Limits): number => Math.round(Math.min(36, Math.max(10, strip * limits.outer)));
const widthOf = (pairs: number, strip: number, limits: Limits): number =>
  pairs * (2 * strip + innerOf(strip, limits)) + (pairs - 1) * outerOf(strip, limits);

function widestStrip(pairs: number, width: number, limits: Limits): number | null {
  for (let strip = limits.maxStrip; strip >= limits.minStrip; strip--) if (widthOf(pairs, strip, limits) <= width) return strip;
  return null;
}

/**
 * Places `lanes` lanes in `width` px: the fewest banks in which a strip keeps its least width; lanes of a pair always stay
 * together and banks differ by one pair at most. Where even single pairs don't fit, the least width is kept (and scrolls).
 */
export function layoutBoard(lanes: number, width: number, limits: Limits = DESK): BoardLayout {
  const pairs = Math.ceil(lanes / 2);
  for (let banks = 1; banks <= pairs; banks++) {
    const strip = widestStrip(Math.ceil(pairs / banks), width, limits);
    if (strip !== null) return place(lanes, width, { pairs, banks, strip }, limits);
  }
  return place(lanes, width, { pairs, banks: Math.max(1, pairs), strip: limits.minStrip }, limits);
}

function place(lanes: number, width: number, { pairs, banks: count, strip }: { pairs: number; banks: number; strip: number }, limits: Limits): BoardLayout {
  const most = Math.ceil(pairs / count);
  const spare = most > 1 ? Math.max(0, width - widthOf(most, strip, limits)) / (most - 1) : 0;
  const gap = innerOf(strip, limits);
  const between = outerOf(strip, limits) + Math.min(spare, strip);
  const banks: Bank[] = [];
  for (let bank = 0, pair = 0; bank < count; bank++) {
    const here = Math.floor(pairs / count) + (bank < pairs % count ? 1 : 0);
    banks.push(bankOf({ pair, here, lanes }, strip, gap, between));
    pair += here;
  }
  return { banks, strip, width: Math.max(...banks.map(rightOf), 0) };
}

function bankOf({ pair, here, lanes }: { pair: number; here: number; lanes: number }, strip: number, gap: number, between: number): Bank {
  const bank: Bank = { strips: [], returns: [] };
  for (let i = 0; i < here; i++) {
    const left = 2 * (pair + i) + 1;
    const x = Math.round(i * (2 * strip + gap + between));
    bank.strips.push({ lane: left, x, width: strip });
    if (left + 1 > lanes) continue;
    bank.strips.push({ lane: left + 1, x: x + strip + gap, width: strip });
    bank.returns.push({ pair: left, x: x + strip, width: gap });
  }
  return bank;
}

const rightOf = (bank: Bank): number => Math.max(0, ...bank.strips.map((s) => s.x + s.width));

/** Heights of one bank, top to bottom, px: machine, pin deck, 60 ft of lane with the foul line, approach, and the two bars. */
export interface Heights {
  cap: number;
  deck: number;
  lane: number;
  approach: number;
  /** Rows of bars under the foul line: now, and next where there is room. */
  rows: 1 | 2;
  /** Whole strip: cap + deck + lane + approach. */
  strip: number;
  bar: number;
  barGap: number;
  bank: number;
}


/** What differs between a desk and the wall's far layer, px. */
export interface Face {
  cap: number;
  deck: number;
  approach: number;
  bar: number;
  rows: 1 | 2;
  minLane: number;
}
export const deskFace = (strip: number, figure: number): Face => ({
  cap: Math.round(Math.min(60, Math.max(38, strip * 0.7))),
  deck: Math.round(Math.min(64, Math.max(28, strip * 0.82))),
  approach: Math.round(figure * 1.06 + 16),
  bar: 28,
  rows: 2,
  minLane: 96,
});
/**
 * State large on the machine, figures without the air that a font leaves above and below them. From three banks on only the
 * far layer is left: state, figure, who is there.
 */
export const wallFace = (figure: number, banks: number): Face =>
  banks <= 2
    ? { cap: 84, deck: 48, approach: Math.round(figure * 0.7 + 22), bar: 36, rows: 2, minLane: 60 }
    : { cap: 58, deck: 0, approach: Math.round(figure * 0.7 + 14), bar: 26, rows: 1, minLane: 14 };

/** Splits the height of a bank; the lane takes what the rest leaves. */
export function heightsOf(bankHeight: number, { minLane, ...face }: Face): Heights {
  const barGap = 5;
  const under = face.rows * (face.bar + barGap) + 4;
  const lane = Math.max(minLane, Math.floor(bankHeight - face.cap - face.deck - face.approach - under));
  const strip = face.cap + face.deck + lane + face.approach;
  return { ...face, lane, strip, barGap, bank: strip + under };
}

/** Size of a lane's figure, px: two figures, narrow, within the strip. */
export const numberSize = (strip: number): number => Math.round(Math.min(40, Math.max(19, strip * 0.66)));

/** Where a bar over lanes `from`–`to` of this bank stands; null when none of them is in it. */
export function spanIn(bank: Bank, from: number, to: number): { x: number; width: number } | null {
  const inside = bank.strips.filter((s) => s.lane >= from && s.lane <= to);
  const first = inside[0];
  const last = inside.at(-1);
  return first && last ? { x: first.x, width: last.x + last.width - first.x } : null;
}
