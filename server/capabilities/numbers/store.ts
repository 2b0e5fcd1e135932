import type { Knex } from 'knex';
import type { NightFigures } from '#shared/domain/numbers/night/figures.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';

export interface IssuedReport {
  date: string;
  issuedAt: number;
  figures: NightFigures;
}

interface ReportRow {
  business_date: string;
  issued_at: Date;
  figures: NightFigures;
}

const issued = (row: ReportRow): IssuedReport => ({ date: row.business_date, issuedAt: fromRowTime(row.issued_at), figures: row.figures });

export async function insertReport(trx: Knex, centreId: Buffer, report: IssuedReport): Promise<void> {
  await trx('night_report').insert({ centre_id: centreId, business_date: report.date, issued_at: toRowTime(report.issuedAt), figures: JSON.stringify(report.figures) });
}

export async function reportOf(db: Knex, centreId: Buffer, date: string): Promise<IssuedReport | null> {
  const row = (await db('night_report').where({ centre_id: centreId, business_date: date }).first()) as ReportRow | undefined;
  return row ? issued(row) : null;
}

/** Reports of these dates that were issued. */
export async function reportsOf(db: Knex, centreId: Buffer, dates: readonly string[]): Promise<IssuedReport[]> {
  const rows = (await db('night_report').where({ centre_id: centreId }).whereIn('business_date', [...dates])) as ReportRow[];
  return rows.map(issued);
}

/** Dates that have a report, newest first. */
export async function reportedDates(db: Knex, centreId: Buffer, limit: number): Promise<string[]> {
  const rows = await db('night_report').where({ centre_id: centreId }).orderBy('business_date', 'desc').limit(limit).select<{ business_date: string }[]>('business_date');
  return rows.map((row) => row.business_date);
}
