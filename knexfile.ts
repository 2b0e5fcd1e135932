import { createDatabase } from './server/platform/db/database.ts';
import { migrationSource } from './server/platform/db/migrate.ts';
import { readConfig } from './server/config.ts';

const { client } = createDatabase(readConfig(process.env).databaseUrl);

/** For Knex's own command line (`npm run migrate`); the server migrates by itself when it starts. */
export default { ...client.config, migrations: { migrationSource } };
