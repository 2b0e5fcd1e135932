import type { Knex } from 'knex';

/** All tables as MariaDB says it would create them, in order of name, without Knex's own and without counters. */
export async function schemaText(db: Knex): Promise<string> {
  const tables: { name: string }[] = await db('information_schema.tables').whereRaw('table_schema = database()').orderBy('table_name').select({ name: 'table_name' });
  const texts: string[] = [];
  for (const { name } of tables) {
    if (name.startsWith('knex_')) continue;
    const [rows] = (await db.raw('show create table ??', [name])) as [Record<string, string>[]];
    texts.push(`${(rows[0]?.['Create Table'] ?? '').replace(/ AUTO_INCREMENT=\d+/, '')};\n`);
  }
  return texts.join('\n');
}
