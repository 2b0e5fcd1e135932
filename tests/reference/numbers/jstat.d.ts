/** The part of jStat that serves as a second opinion; the package ships no types. */
declare module 'jstat' {
  interface Distribution2 {
    cdf(x: number, a: number, b: number): number;
    inv(p: number, a: number, b: number): number;
  }
  const jstat: {
    jStat: {
      chisquare: { cdf(x: number, df: number): number; inv(p: number, df: number): number };
      poisson: { cdf(k: number, mean: number): number; pdf(k: number, mean: number): number };
      binomial: { pdf(k: number, n: number, p: number): number };
      beta: Distribution2;
      normal: Distribution2;
      gamma: Distribution2;
      weibull: Distribution2;
    };
  };
  export = jstat;
}
