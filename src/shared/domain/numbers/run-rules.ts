/** One rule over standardised values z = (value − centre) ÷ sigma: places (from 0) of the points at which it fires. */
export type RunRule = (z: readonly number[]) => number[];

/** Places at which at least `need` of the last `span` values satisfy the condition. */
function windows(z: readonly number[], span: number, need: number, holds: (value: number) => boolean): number[] {
  const places: number[] = [];
  const recent = new Uint8Array(span);
  let inside = 0;
  for (let i = 0, slot = 0; i < z.length; i += 1) {
    const now = holds(z[i] as number) ? 1 : 0;
    inside += now - (recent[slot] as number);
    recent[slot] = now;
    slot = slot + 1 === span ? 0 : slot + 1;
    if (inside >= need && i >= span - 1) places.push(i);
  }
  return places;
}

/** The same on either side of the centre, in order of place. */
function eitherSide(z: readonly number[], span: number, need: number, beyond: number): number[] {
  const above = windows(z, span, need, (value) => value > beyond);
  const below = windows(z, span, need, (value) => value < -beyond);
  return below.length === 0 ? above : [...new Set([...above, ...below])].sort((a, b) => a - b);
}

/** Places at which `steps` successive steps between neighbours all satisfied the condition. */
function steps(z: readonly number[], count: number, continues: (before: number, now: number, after: number) => boolean, first: (a: number, b: number) => boolean): number[] {
  const places: number[] = [];
  let run = 0;
  for (let i = 1; i < z.length; i += 1) {
    const [before, now] = [z[i - 1] as number, z[i] as number];
    const starts = first(before, now);
    if (!starts) run = 0;
    else run = run > 0 && continues(z[i - 2] as number, before, now) ? run + 1 : 1;
    if (run >= count) places.push(i);
  }
  return places;
}

/** One point strictly beyond three sigma. */
export const beyondThreeSigma: RunRule = (z) => windows(z, 1, 1, (value) => Math.abs(value) > 3);

/** `length` successive points on one side of the centre: 9 after Nelson, 8 after Western Electric. */
export const oneSide = (z: readonly number[], length: number): number[] => eitherSide(z, length, length, 0);

/** Six successive points steadily rising or falling. */
export const steadyTrend: RunRule = (z) =>
  steps(z, 5, (before, now, after) => (after - now) * (now - before) > 0, (a, b) => a !== b);

/** Fourteen successive points alternating up and down. */
export const alternating: RunRule = (z) =>
  steps(z, 13, (before, now, after) => (after - now) * (now - before) < 0, (a, b) => a !== b);

/** Two of three successive points beyond two sigma on the same side. */
export const twoOfThree: RunRule = (z) => eitherSide(z, 3, 2, 2);

/** Four of five successive points beyond one sigma on the same side. */
export const fourOfFive: RunRule = (z) => eitherSide(z, 5, 4, 1);

/** Fifteen successive points within one sigma of the centre, on either side. */
export const huggingCentre: RunRule = (z) => windows(z, 15, 15, (value) => Math.abs(value) < 1);

/** Eight successive points beyond one sigma, both sides occurring. */
export const avoidingCentre: RunRule = (z) => {
  const oneSided = new Set(eitherSide(z, 8, 8, 1));
  return windows(z, 8, 8, (value) => Math.abs(value) > 1).filter((place) => !oneSided.has(place));
};

/**
 * The eight rules by L. S. Nelson, Journal of Quality Technology 16 (1984) 237–239, numbered as there.
 * They are meant for single, nearly normal values; for charts of counts use the first, perhaps the second.
 */
export const nelsonRules: { [Rule in 1 | 2 | 3 | 4 | 5 | 6 | 7 | 8]: RunRule } = {
  1: beyondThreeSigma,
  2: (z) => oneSide(z, 9),
  3: steadyTrend,
  4: alternating,
  5: twoOfThree,
  6: fourOfFive,
  7: huggingCentre,
  8: avoidingCentre,
};

/** The four zone rules of the Western Electric Statistical Quality Control Handbook (1956): its one-sided run is 8 long. */
export const westernElectricRules: { [Rule in 1 | 2 | 3 | 4]: RunRule } = {
  1: beyondThreeSigma,
  2: twoOfThree,
  3: fourOfFive,
  4: (z) => oneSide(z, 8),
};
