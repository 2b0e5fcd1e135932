import type { Knex } from 'knex';

const JOB = 'demo-loaded';

/** Whether a demo was loaded to its end in this database. */
export async function demoIsLoaded(db: Knex): Promise<boolean> {
  return (await db('job_run').where({ job: JOB }).first()) !== undefined;
}

/** Any centre at all: a demo never comes beside a house that is in use. */
export async function anyCentre(db: Knex): Promise<string[]> {
  return (await db('centre').select<{ slug: string }[]>('slug')).map((row) => row.slug);
}

export async function markLoaded(db: Knex, slug: string, date: string, now: number): Promise<void> {
  const centre = await db('centre').where({ slug }).first<{ id: Buffer }>('id');
  if (centre) await db('job_run').insert({ centre_id: centre.id, job: JOB, business_date: date, done_at: new Date(now) });
}

/** Takes away what a load that was cut off has left: all rows of that centre, and the demo's accounts. */
export async function wipeHouse(db: Knex, slug: string): Promise<void> {
  const centre = await db('centre').where({ slug }).first<{ id: Buffer } | undefined>('id');
  if (!centre) return;
  const [tables] = (await db.raw("select table_name as name from information_schema.columns where table_schema = database() and column_name = 'centre_id'")) as [{ name: string }[]];
  await db.transaction(async (trx) => {
    await trx.raw('set foreign_key_checks = 0');
    for (const { name } of tables) await trx(name).where({ centre_id: centre.id }).delete();
    await trx('user').where('email', 'like', '%@tarn-ferry.example').delete();
    await trx('centre').where({ id: centre.id }).delete();
    await trx.raw('set foreign_key_checks = 1');
  });
}
