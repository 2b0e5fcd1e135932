import type { Knex } from 'knex';
import cron from 'node-cron';
import type { Clock } from '../clock.ts';
import type { Logger } from '../log.ts';
import type { Job } from './job.ts';

export interface Schedule {
  /** No new ticks; resolves when what runs has ended. */
  stop(): Promise<void>;
}

/**
 * node-cron only ticks. A job that still runs is not started again, and a database lock of its name keeps other nodes out;
 * an error is logged and the next tick tries again. Jobs run once at the start too: what was missed is caught up.
 */
export function startSchedule(jobs: readonly Job[], { db, clock, log }: { db: Knex; clock: Clock; log: Logger }): Schedule {
  const running = new Map<string, Promise<void>>();
  const tick = (job: Job): void => {
    if (running.has(job.name)) return;
    const work = runLocked(db, job, clock.now())
      .catch((error: unknown) => { log.error({ err: error, job: job.name }, 'job failed'); })
      .finally(() => { running.delete(job.name); });
    running.set(job.name, work);
  };
  const tasks = jobs.map((job) => cron.schedule(job.every, () => tick(job), { name: job.name }));
  jobs.forEach(tick);
  return {
    async stop() {
      await Promise.all(tasks.map((task) => task.stop()));
      await Promise.all(running.values());
    },
  };
}

/** Holds the database's lock for the job on a connection of its own while it runs. */
async function runLocked(db: Knex, job: Job, now: number): Promise<void> {
  const name = `lanewright:${job.name}`;
  const client = db.client as { acquireConnection(): Promise<unknown>; releaseConnection(connection: unknown): Promise<void> };
  const connection = await client.acquireConnection();
  try {
    const [[taken]] = (await db.raw('select get_lock(?, 0) as ok', [name]).connection(connection)) as [{ ok: number }[]];
    if (taken?.ok !== 1) return;
    try {
      await job.run(now);
    } finally {
      await db.raw('select release_lock(?)', [name]).connection(connection);
    }
  } finally {
    await client.releaseConnection(connection);
  }
}
