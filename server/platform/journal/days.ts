import { businessDayAt } from '#shared/domain/business-day.ts';
import { checkpointHouse, foldHouse } from '#shared/domain/house/fold.ts';
import { emptyHouse, type House } from '#shared/domain/house/state.ts';
import type { Fact } from '#shared/domain/journal/fact.ts';
import { insert, rebased, startTimeline, type Timeline } from '#shared/domain/journal/timeline.ts';
import type { CentreRef } from '../http/route.ts';

/** One business day in memory: its facts, upon the house as it was at the cut (what had ended before is in the tables). */
export interface Day {
  /** Cut at which it begins, epoch ms; 0 for the time before a centre's first cut. */
  from: number;
  timeline: Timeline<House>;
}

/** Days without a gap between them, oldest first; the last has no end. Never changed in place. */
export type Days = readonly [Day, ...Day[]];

/** How long after a cut, and after its last late fact, an earlier day stays in memory. */
const KEEP_MS = 60 * 60_000;

export const newDay = (from: number, base: House): Day => ({ from, timeline: startTimeline(base) });
export const firstDays = (lanes: number): Days => [newDay(0, emptyHouse(lanes))];

export const lastOf = (days: Days): Day => days.at(-1) ?? days[0];
/** The house after all facts, holding what ended since the last cut. */
export const houseOf = (days: Days): House => lastOf(days).timeline.state;

/** Begins the business day of an instant, unless it has begun. Days on which nothing happened get none. */
export const begun = (days: Days, centre: Pick<CentreRef, 'zone' | 'cut'>, instant: number): Days =>
  begunAt(days, businessDayAt(instant, centre.zone, centre.cut).from);

export function begunAt(days: Days, from: number): Days {
  const last = lastOf(days);
  return from > last.from ? [...days, newDay(from, checkpointHouse(last.timeline.state))] : days;
}

/**
 * Puts facts into their days. A fact of an earlier day changes the base of every day after it, so those are folded anew.
 * None may be older than the first day: see `withEarlier` in load.ts.
 */
export function applied(days: Days, facts: readonly Fact[]): Days {
  if (facts.length === 0) return days;
  let base: House | null = null;
  const next = days.map((day, i) => {
    const end = days[i + 1]?.from ?? Infinity;
    const mine = facts.filter((fact) => fact.time >= day.from && fact.time < end);
    if (!base && mine.length === 0) return day;
    const upon = base ? rebased(day.timeline, foldHouse, base) : day.timeline;
    const { timeline } = insert(upon, foldHouse, mine);
    base = checkpointHouse(timeline.state);
    return { from: day.from, timeline };
  });
  return next as unknown as Days;
}

/** Forgets days that are over for an hour, and for which nothing came late within the last. */
export function trimmed(days: Days, now: number, lateAt: number): Days {
  const [, second, ...rest] = days;
  if (!second || now < second.from + KEEP_MS || now < lateAt + KEEP_MS) return days;
  return trimmed([second, ...rest], now, lateAt);
}
