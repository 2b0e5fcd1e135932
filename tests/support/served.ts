import { afterAll } from 'vitest';
import { freshDatabase, type TestDatabase } from './db.ts';
import { startServer, type TestServer } from './server.ts';

/** A server upon the worker's database for the tests of one file, or of the `describe` that awaits it; it ends with them. */
export async function served(given: Omit<Parameters<typeof startServer>[0], 'db'>): Promise<{ server: TestServer; database: TestDatabase }> {
  const database = await freshDatabase();
  const server = await startServer({ ...given, db: database.db });
  afterAll(async () => {
    await server.close();
    await database.close();
  });
  return { server, database };
}
