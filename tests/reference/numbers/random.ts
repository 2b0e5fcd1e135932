/** Repeatable random numbers for simulations: every simulation names its own start. */
export type Random = {
  uniform(): number;
  exponential(mean: number): number;
  normal(): number;
  poisson(mean: number): number;
  /** Shape of 1 or more. */
  gamma(shape: number, mean: number): number;
  weibull(shape: number, scale: number): number;
};

/** mulberry32: a 32-bit counter, well mixed; period 2³². */
export function random(start: number): Random {
  let state = start >>> 0;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    // Half a step off, so that a value is never 0 or 1.
    return (((t ^ (t >>> 14)) >>> 0) + 0.5) / 4_294_967_296;
  };
  const exponential = (mean: number): number => -mean * Math.log(uniform());
  const normal = (): number => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  const poisson = (mean: number): number => {
    if (mean > 20) return poisson(mean / 2) + poisson(mean / 2);
    const floor = Math.exp(-mean);
    let [count, product] = [0, uniform()];
    while (product > floor) {
      count += 1;
      product *= uniform();
    }
    return count;
  };
  /** G. Marsaglia and W. W. Tsang, ACM Transactions on Mathematical Software 26 (2000) 363–372; shape 1 or more. */
  const gamma = (shape: number, mean: number): number => {
    const d = shape - 1 / 3;
    for (;;) {
      const x = normal();
      const v = (1 + x / Math.sqrt(9 * d)) ** 3;
      if (v > 0 && Math.log(uniform()) < 0.5 * x * x + d - d * v + d * Math.log(v)) return (d * v * mean) / shape;
    }
  };
  const weibull = (shape: number, scale: number): number => scale * (-Math.log(uniform())) ** (1 / shape);
  return { uniform, exponential, normal, poisson, gamma, weibull };
}

/** Share of `runs` in which the event came, and its standard error at the share that was promised. */
export function share(runs: number, promised: number, event: () => boolean): { share: number; error: number } {
  let hits = 0;
  for (let i = 0; i < runs; i += 1) if (event()) hits += 1;
  return { share: hits / runs, error: Math.sqrt((promised * (1 - promised)) / runs) };
}
