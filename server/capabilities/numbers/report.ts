import { addDays, type BusinessDay, businessDay, businessDayAt } from '#shared/domain/business-day.ts';
import { nightReportMail } from '#shared/text/en/numbers.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { onceADay } from '#server/platform/schedule/once-a-day.ts';
import type { Notices } from '../notices/index.ts';
import { figuresOf, type NightDeps } from './night.ts';
import { insertReport, type IssuedReport, reportedDates } from './store.ts';

/** A report is issued this long after the cut: late events of the night are in by then. */
export const AFTER_CUT_MS = 15 * 60_000;
const JOB = 'night-report';
/** How far back nights are caught up. */
const CATCH_UP_DAYS = 60;

/** Issues the report of one business date, once, whoever asks; null when it had been issued. `mail` false: it is only kept. */
export async function issue(deps: NightDeps & { notices: Notices }, centre: CentreRef, date: string, now: number, mail: boolean): Promise<IssuedReport | null> {
  const { figures } = await figuresOf(deps, centre, date, now);
  const report: IssuedReport = { date, issuedAt: now, figures };
  const to = mail ? await deps.sources.managers(centre) : [];
  const done = await deps.db.transaction((trx) =>
    onceADay(trx, JOB, centre.id, date, now, async () => {
      await insertReport(trx, centre.id, report);
      for (const recipient of to) {
        await deps.notices.queueMail(trx, { centreId: centre.id, key: `${JOB}/${date}`, to: recipient, ...nightReportMail(centre.name, date, figures) });
      }
    }));
  return done ? report : null;
}

/** Dates whose report is due at `now` and wasn't issued, oldest first. A centre without any report begins with its last night, if anything was told of it. */
export async function dueDates(deps: NightDeps, centre: CentreRef, now: number): Promise<string[]> {
  const last: BusinessDay = businessDayAt(now - AFTER_CUT_MS, centre.zone, centre.cut);
  const newest = addDays(last.date, -1);
  const [reported] = await reportedDates(deps.db, centre.id, 1);
  if (reported === undefined) {
    const night = businessDay(newest, centre.zone, centre.cut);
    return (await deps.ledger.facts(centre, night.from, night.to)).length > 0 ? [newest] : [];
  }
  const dates: string[] = [];
  for (let date = newest; dates.length < CATCH_UP_DAYS && date > reported; date = addDays(date, -1)) dates.unshift(date);
  return dates;
}

/** Issues what is due; after an outage every night gets its report, and only the latest is mailed. */
export async function issueDue(deps: NightDeps & { notices: Notices }, centre: CentreRef, now: number): Promise<number> {
  const dates = await dueDates(deps, centre, now);
  let issued = 0;
  for (const date of dates) if (await issue(deps, centre, date, now, date === dates.at(-1))) issued += 1;
  return issued;
}
