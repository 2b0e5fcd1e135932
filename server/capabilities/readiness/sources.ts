import { readinessBy } from '#shared/domain/house-rules.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import { patternVolume } from '#shared/domain/runs/volume.ts';
import type { KnownPattern, LaneFacts, Surroundings } from '#shared/domain/readiness/situation.ts';
import type { Centre } from '#server/capabilities/centre/index.ts';
import type { Leagues } from '#server/capabilities/leagues/index.ts';
import type { Notices } from '#server/capabilities/notices/index.ts';
import type { Library, Runs } from '#server/capabilities/runs/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Weights } from './store.ts';

/** What readiness asks of the slices whose matters it weighs; compose.ts joins their front doors to it. */
export interface ReadinessSources {
  centre: Pick<Centre, 'lanes' | 'all'>;
  leagues: Pick<Leagues, 'session' | 'sessionsBetween' | 'sessionsOfDate' | 'movePair'>;
  notices: Pick<Notices, 'queueMail'>;
  runs: Pick<Runs, 'readLibrary'>;
}

/** What of a centre's records readiness rests on, besides its house. */
export interface Records {
  lanes: readonly LaneFacts[];
  sessions: readonly Session[];
  patterns: readonly KnownPattern[];
  weights: Weights;
}

/** A session may still be on its lanes this long after its booked end. */
const OVERRUN_MS = 12 * 3_600_000;

/** Records of a centre, with the sessions that touch [now, until) or may not have left yet. */
export async function recordsOf(sources: ReadinessSources, weightsOf: (centre: CentreRef) => Promise<Weights>, centre: CentreRef, now: number, until: number): Promise<Records> {
  const [lanes, sessions, library, weights] = await Promise.all([
    sources.centre.lanes(centre), sources.leagues.sessionsBetween(centre, now - OVERRUN_MS, until), sources.runs.readLibrary(centre), weightsOf(centre),
  ]);
  return { lanes: lanes.map(({ lane, family, certifiedUntil }) => ({ lane, family, certifiedUntil })), sessions, patterns: knownPatterns(library), weights };
}

/** Patterns written down in a centre, with the conditioner a lane of each revision takes. */
function knownPatterns({ patterns, revisions }: Library): KnownPattern[] {
  return patterns.map(({ code, name }) => ({
    code, name,
    revisions: revisions.filter((one) => one.code === code).map(({ revision, body }) => {
      const { A, B } = patternVolume(body).byProduct;
      return { revision, aUl: A, bUl: B };
    }),
  }));
}

export const surroundings = (centre: CentreRef, house: House, records: Records, now: number): Surroundings => ({
  now, floor: house.floor, calls: house.calls, runs: house.runs, lanes: records.lanes, sessions: records.sessions, patterns: records.patterns,
  settings: readinessBy(centre.rules, records.weights),
});
