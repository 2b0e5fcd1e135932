import { numbersContracts as c } from '#shared/contracts/numbers.ts';
import { addDays, businessDayAt, isDate } from '#shared/domain/business-day.ts';
import { invalid, notFound } from '#server/platform/http/refusal.ts';
import { type Route, serve } from '#server/platform/http/route.ts';
import { differences, pastOf } from './compare.ts';
import { funnelOf } from './funnel-view.ts';
import { figuresOf, type NightDeps } from './night.ts';
import { reportedDates, reportOf, reportsOf } from './store.ts';

const WEEKS = 8;
const NIGHTS_LISTED = 60;

export function numbersRoutes(deps: NightDeps): Route[] {
  return [
    serve(c.night, async ({ centre, params, now }) => {
      const { date } = params;
      if (!isDate(date)) throw invalid('night.date-invalid', '/date');
      if (date > businessDayAt(now, centre.zone, centre.cut).date) throw notFound('night.not-begun', { date });
      const weekdays = Array.from({ length: WEEKS }, (_, i) => addDays(date, -7 * (i + 1)));
      const [{ day, figures }, report, past, nights] = await Promise.all([
        figuresOf(deps, centre, date, now), reportOf(deps.db, centre.id, date), reportsOf(deps.db, centre.id, weekdays), reportedDates(deps.db, centre.id, NIGHTS_LISTED),
      ]);
      return {
        date, from: day.from, to: day.to, at: now, running: now < day.to, figures,
        report: report && { issuedAt: report.issuedAt, figures: report.figures },
        differs: report ? differences(report.figures, figures) : [],
        past: pastOf(past.map((p) => p.figures)), nights,
      };
    }),
    serve(c.lanes, ({ centre, now }) => funnelOf(deps.db, centre, now)),
  ];
}
