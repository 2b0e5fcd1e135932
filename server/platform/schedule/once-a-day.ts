import type { Knex } from 'knex';
import { isDuplicate } from '../db/errors.ts';

/**
 * Does something once for a business date of a centre, whatever crashes between and however many nodes try: the row in
 * `job_run` is written in the same transaction as the work. False when it had been done.
 */
export async function onceADay(trx: Knex.Transaction, job: string, centreId: Buffer, businessDate: string, now: number, work: () => Promise<void>): Promise<boolean> {
  try {
    await trx('job_run').insert({ centre_id: centreId, job, business_date: businessDate, done_at: new Date(now) });
  } catch (error) {
    if (isDuplicate(error)) return false;
    throw error;
  }
  await work();
  return true;
}
