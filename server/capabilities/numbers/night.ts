import { addDays, type BusinessDay, businessDay, instantOfWall, weekdayOf } from '#shared/domain/business-day.ts';
import { neighbourOf } from '#shared/domain/equipment.ts';
import { type NightFigures, nightFigures } from '#shared/domain/numbers/night/figures.ts';
import type { NightInput } from '#shared/domain/numbers/night/input.ts';
import type { Span } from '#shared/domain/numbers/spans.ts';
import type { Database } from '#server/platform/db/database.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { nightRows } from './read-model.ts';
import type { NumbersSources } from './sources.ts';

export interface NightDeps {
  db: Database;
  ledger: Ledger;
  sources: NumbersSources;
}

/** Opening hours that lie within a business day: those of its own date, and the small hours of the next. */
export function openingWithin(day: BusinessDay, hours: readonly ({ from: number; to: number } | null)[], zone: string): Span[] {
  const open = hours[weekdayOf(day.date) - 1];
  if (!open) return [];
  const at = (minutes: number): number => {
    const wall = instantOfWall(addDays(day.date, Math.floor(minutes / 1440)), minutes % 1440, zone);
    // Inside the hour that the clocks skip: the moment at which they are put forward.
    return wall.ok ? wall.instant : at(minutes + 1);
  };
  const span = { from: Math.max(day.from, at(open.from)), to: Math.min(day.to, at(open.to)) };
  return span.to > span.from ? [span] : [];
}

/** Counter readings of leagues' lanes while the other lane of their pair stood: did they bowl on there? */
async function bowledDuringStops({ ledger }: NightDeps, centre: CentreRef, input: Omit<NightInput, 'bowled' | 'ready'>): Promise<NightInput['bowled']> {
  const leagues = input.sessions.filter((s) => s.kind === 'league' || s.kind === 'tournament');
  const stops = input.calls.flatMap((call) => call.stops.map((stop) => ({ lane: call.lane, from: stop.from, to: stop.to ?? input.now })));
  const felt = stops.filter((stop) => leagues.some((s) => s.lanes.includes(stop.lane) && s.startAt < stop.to && stop.from < s.endAt));
  const heard = await Promise.all(felt.map(async (stop) => {
    const facts = await ledger.facts(centre, stop.from, Math.min(stop.to, stop.from + 3_600_000));
    return facts.flatMap((f) => (f.type === 'lane.counted' && f.data.lane === neighbourOf(stop.lane) ? [{ lane: f.data.lane, at: f.time }] : []));
  }));
  return heard.flat();
}

/** Figures of a business date as the tables have them at `now`. */
export async function figuresOf(deps: NightDeps, centre: CentreRef, date: string, now: number): Promise<{ day: BusinessDay; figures: NightFigures }> {
  const day = businessDay(date, centre.zone, centre.cut);
  const [rows, sessions, hours, ready] = await Promise.all([
    nightRows(deps.db, centre, day),
    deps.sources.sessions(centre, day.from, day.to),
    deps.sources.opening(centre),
    deps.sources.readyAtWarmUp(centre, day.from, day.to),
  ]);
  const input = { day, now: Math.min(now, day.to), opening: openingWithin(day, hours, centre.zone), sessions, ...rows };
  return { day, figures: nightFigures({ ...input, ready, bowled: await bowledDuringStops(deps, centre, input) }) };
}
