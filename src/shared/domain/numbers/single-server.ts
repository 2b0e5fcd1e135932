import { demandAmount, demandPositive } from './demand.ts';
import { missing, type Missing } from './missing.ts';

export type SingleServer = { utilisation: number; meanWait: number; meanTime: number; waiting: number; inSystem: number };

/**
 * One mechanic, calls at random, work times of any distribution (M/G/1): Pollaczek–Khinchine mean wait
 * arrivals·(mean² + variance) ÷ 2(1 − utilisation). One unit of time throughout.
 * Source: F. Pollaczek (1930), A. Y. Khinchine (1932).
 */
export function singleServer(arrivals: number, meanService: number, serviceVariance: number): SingleServer | Missing<'overloaded'> {
  demandAmount('arrivals', arrivals);
  demandPositive('meanService', meanService);
  demandAmount('serviceVariance', serviceVariance);
  const utilisation = arrivals * meanService;
  if (utilisation >= 1) return missing('overloaded');
  const meanWait = (arrivals * (meanService ** 2 + serviceVariance)) / (2 * (1 - utilisation));
  const meanTime = meanWait + meanService;
  return { utilisation, meanWait, meanTime, waiting: arrivals * meanWait, inSystem: arrivals * meanTime };
}
