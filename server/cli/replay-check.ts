import { createCentre } from '../capabilities/centre/index.ts';
import { configFromEnvironment } from '../config.ts';
import { systemClock } from '../platform/clock.ts';
import { createDatabase } from '../platform/db/database.ts';
import { createLedger } from '../platform/journal/create-ledger.ts';
import { checkReplay } from '../platform/journal/replay-check.ts';
import { createLog } from '../platform/log.ts';

/**
 * `npm run replay:check`: folds the journal of every centre anew and compares it with the rows that are stored, but for versions and
 * times of writing. Ends with 1 when a row or field differs, and names it; with 2 when there was nothing to read.
 */
const TOLD = 50;

const db = createDatabase(configFromEnvironment().databaseUrl, { connections: 3 });
const slice = createCentre({ db, clock: systemClock, ledger: createLedger({ db, clock: systemClock }), log: createLog('silent') });

try {
  let [events, rows, differences] = [0, 0, 0];
  for (const centre of await slice.all()) {
    const found = await checkReplay(db, centre);
    events += found.events;
    rows += found.rows;
    differences += found.differences.length;
    for (const difference of found.differences.slice(0, TOLD)) console.log(`${centre.slug}: ${difference}`);
    if (found.differences.length > TOLD) console.log(`${centre.slug}: and ${found.differences.length - TOLD} more`);
  }
  console.log(`${events} events read, ${rows} rows compared, ${differences} differences`);
  process.exitCode = events === 0 ? 2 : differences > 0 ? 1 : 0;
} finally {
  await slice.stop();
  await db.destroy();
}
