import { parseArgs } from 'node:util';
import { createCentre } from '../capabilities/centre/index.ts';
import { configFromEnvironment } from '../config.ts';
import { systemClock } from '../platform/clock.ts';
import { createDatabase } from '../platform/db/database.ts';
import { migrate } from '../platform/db/migrate.ts';
import { createLedger } from '../platform/journal/create-ledger.ts';
import { createLog } from '../platform/log.ts';

/** `npm run gateway:key -- <centre> [--name "…"]`: makes a gateway and prints its key alone on the last line. It is shown this once. */
const { positionals, values } = parseArgs({ allowPositionals: true, options: { name: { type: 'string' } } });
const [slug] = positionals;
const db = createDatabase(configFromEnvironment().databaseUrl, { connections: 2 });
const clock = systemClock;
const slice = createCentre({ db, clock, ledger: createLedger({ db, clock }), log: createLog('silent') });

try {
  await migrate(db);
  const centre = slug === undefined ? null : await slice.bySlug(slug);
  if (centre) {
    const name = values.name ?? `Gateway ${new Date(clock.now()).toISOString()}`;
    const { key } = await slice.addGateway(centre, name);
    console.log(`"${name}" of ${centre.name}. Its key, shown this once:`);
    console.log(key);
  } else {
    const known = (await slice.all()).map((one) => one.slug);
    console.error(`Which centre? npm run gateway:key -- <centre>. ${known.length > 0 ? `There ${known.length === 1 ? 'is' : 'are'}: ${known.join(', ')}` : 'There is none yet.'}`);
    process.exitCode = 1;
  }
} finally {
  await slice.stop();
  await db.destroy();
}
