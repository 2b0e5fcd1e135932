import { demandAmount, demandPositive } from './demand.ts';
import type { Termination } from './mtbf.ts';

/**
 * Events on a clock that starts at 0 (hours of use, frames), in order, and how the watch ended:
 * 'time' at `end`; 'failure' at the last event, `end` then being its time and the last event carrying no information
 * beyond it.
 */
export type EventSeries = { times: readonly number[]; end: number; termination?: Termination };

/** The events that tests of trend use (all, or all but the last) and the end of the watch. */
export function interior(series: EventSeries): { times: readonly number[]; end: number } {
  const { times, end, termination = 'time' } = series;
  demandPositive('end', end);
  let last = 0;
  for (const time of times) {
    demandAmount('time', time);
    if (time < last) throw new RangeError('times must be in order');
    last = time;
  }
  if (last > end) throw new RangeError('no event may come after the end');
  if (termination === 'time') return { times, end };
  if (times.length > 0 && last !== end) throw new RangeError('a failure-terminated watch ends at its last event');
  return { times: times.slice(0, -1), end };
}
