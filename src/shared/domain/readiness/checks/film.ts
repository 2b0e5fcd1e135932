import { freshness, hoursBetween, meetsFreshDemand } from '../../runs/ageing.ts';
import { type ExpectedPlay, forecastDeliveries } from '../../runs/forecast.ts';
import { belongsTo } from '../occupancy.ts';
import type { Params } from '../check.ts';
import type { LaneSituation } from '../situation.ts';
import { isKnown } from './by-run.ts';

export interface FilmFault {
  code: 'pattern.never-dressed' | 'pattern.other' | 'pattern.unverified' | 'pattern.worn' | 'pattern.played-on' | 'pattern.after-repair' | 'pattern.broken-off';
  params: Params;
}

/** Deliveries on the film by others than the session's own people; null where nobody counts. */
export function deliveriesByOthers(at: LaneSituation): number | null {
  const { lane, session } = at;
  if (!lane.hears.deliveries) return null;
  const uses = lane.use ? [...lane.uses, lane.use] : lane.uses;
  const own = uses.filter((use) => belongsTo(use, session)).reduce((sum, use) => sum + (lane.deliveriesSinceBy[String(use.from)] ?? 0), 0);
  return lane.deliveriesSince - own;
}

/** Deliveries by others expected on this film at warm-up: those so far, and of whoever has the lane until then. */
export function deliveriesAtWarmUp(at: LaneSituation): number | null {
  const counted = deliveriesByOthers(at);
  const play: ExpectedPlay[] = at.occupants.map(({ from, endAt, framesLeft }) => {
    const start = Math.max(from, at.now);
    return { start, end: Math.max(start + 1, endAt ?? at.session.warmUpAt), frames: framesLeft ?? 0 };
  });
  if (counted === null && play.length === 0) return null;
  return forecastDeliveries(counted ?? 0, play, { now: at.now, at: at.session.warmUpAt }).likely;
}

/**
 * What is wrong with the film that lies on a lane, as forecast at warm-up; null: it does for this session.
 * Asked for fresh lanes: nobody else on them since dressing beyond the tolerance, and none repaired since.
 */
export function filmFault(at: LaneSituation): FilmFault | null {
  const { lane, session, settings } = at;
  const { dressed } = lane;
  if (lane.brokenOff) return { code: 'pattern.broken-off', params: { run: lane.brokenOff.run } };
  if (!dressed) return { code: 'pattern.never-dressed', params: {} };
  if (session.pattern !== null) {
    if (dressed.pattern === null || !isKnown(dressed.pattern, dressed.revision, at)) return { code: 'pattern.unverified', params: { pattern: dressed.pattern ?? '', dressedAt: dressed.at } };
    const other = dressed.pattern !== session.pattern || (session.revision !== null && dressed.revision !== session.revision);
    if (other) return { code: 'pattern.other', params: { pattern: dressed.pattern, revision: dressed.revision ?? 0 } };
  }
  const deliveries = deliveriesAtWarmUp(at);
  const hours = hoursBetween(dressed.at, session.warmUpAt);
  if (freshness({ deliveries, hours }, settings.ageing) === 'worn') return { code: 'pattern.worn', params: { deliveries: deliveries ?? 0, hours: Math.floor(hours) } };
  return session.fresh ? freshFault(at, deliveries, hours) : null;
}

function freshFault(at: LaneSituation, deliveries: number | null, hours: number): FilmFault | null {
  const { repairedAt, lane, settings } = at;
  if (repairedAt !== null && lane.dressed && repairedAt > lane.dressed.at) return { code: 'pattern.after-repair', params: { repairedAt } };
  if (meetsFreshDemand(deliveries, settings.ageing) === false) return { code: 'pattern.played-on', params: { deliveries: deliveries ?? 0, tolerance: settings.ageing.freshTolerance } };
  return hours > settings.ageing.freshHours ? { code: 'pattern.worn', params: { deliveries: deliveries ?? 0, hours: Math.floor(hours) } } : null;
}
