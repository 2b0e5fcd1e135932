import type { SessionBar } from '#shared/contracts/floor.ts';
import type { readinessContracts, SessionView } from '#shared/contracts/readiness.ts';
import type { ResponseOf } from '#shared/contracts/contract.ts';
import { businessDay, businessDayAt, isDate } from '#shared/domain/business-day.ts';
import type { House } from '#shared/domain/house/state.ts';
import { invalid, notFound } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { type Records, type ReadinessSources, surroundings } from './sources.ts';
import type { KeptOfSessions } from './store.ts';
import { sessionBar, sessionSummary, sessionView } from './view.ts';

export interface ScreenDeps {
  ledger: Ledger;
  leagues: ReadinessSources['leagues'];
  records: (centre: CentreRef, now: number, until: number) => Promise<Records>;
  kept: (centre: CentreRef, sessions: readonly string[]) => Promise<KeptOfSessions>;
}

/** The floor asks ten times a second; rows change rarely, and then this process says so. */
const TRUST_MS = 1_000;
interface Remembered {
  until: number;
  rows: Promise<{ records: Records; kept: KeptOfSessions; from: number; to: number }>;
}

/** What screens show of readiness: computed when read from house and rows. */
export function readinessScreen({ ledger, leagues, records, kept }: ScreenDeps) {
  const remembered = new Map<string, Remembered>();

  async function rowsOf(centre: CentreRef, now: number): Promise<{ records: Records; kept: KeptOfSessions; from: number; to: number }> {
    const day = businessDayAt(now, centre.zone, centre.cut);
    const known = await records(centre, now, day.to + 12 * 3_600_000);
    const ids = known.sessions.filter((session) => session.startAt >= day.from && session.startAt < day.to).map((session) => session.id);
    return { records: known, kept: await kept(centre, ids), from: day.from, to: day.to };
  }

  return {
    /** Rows of a centre are read anew. */
    forget: (centre: CentreRef): void => void remembered.delete(centre.slug),

    /** Bars of this business day, by start. */
    async upcoming(centre: CentreRef, house: House, now: number): Promise<SessionBar[]> {
      const at = performance.now();
      const there = remembered.get(centre.slug);
      const rows = there && there.until > at ? there.rows : rowsOf(centre, now);
      if (rows !== there?.rows) {
        remembered.set(centre.slug, { until: at + TRUST_MS, rows });
        rows.catch(() => remembered.delete(centre.slug));
      }
      const { records: known, kept: of, from, to } = await rows;
      const around = surroundings(centre, house, known, now);
      return known.sessions.filter((session) => session.startAt >= from && session.startAt < to).map((session) => sessionBar(session, around, of, centre.zone));
    },

    async list(centre: CentreRef, date: string | undefined, own: readonly string[] | null, now: number): Promise<ResponseOf<typeof readinessContracts.list>> {
      if (date !== undefined && !isDate(date)) throw invalid('league.date-invalid', '/date', { date });
      const day = date === undefined ? businessDayAt(now, centre.zone, centre.cut) : businessDay(date, centre.zone, centre.cut);
      const { state } = await ledger.read(centre);
      const mine = (await leagues.sessionsOfDate(centre, day.date)).filter((session) => own === null || (session.leagueId !== null && own.includes(session.leagueId)));
      const known = await records(centre, now, Math.max(day.to, now) + 12 * 3_600_000);
      const of = await kept(centre, mine.map((session) => session.id));
      const around = surroundings(centre, state, known, now);
      return { date: day.date, at: now, sessions: mine.filter((session) => session.status === 'booked').map((session) => sessionSummary(session, around, of, centre.zone)) };
    },

    async see(centre: CentreRef, id: string, now: number): Promise<SessionView> {
      const session = await leagues.session(centre, id);
      if (!session) throw notFound('booking.unknown');
      const { state } = await ledger.read(centre);
      const known = await records(centre, now, Math.max(session.endAt, now) + 1);
      return sessionView(session, surroundings(centre, state, known, now), await kept(centre, [id]), centre.zone);
    },
  };
}
export type ReadinessScreen = ReturnType<typeof readinessScreen>;
