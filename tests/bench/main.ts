import { createDatabase } from '#server/platform/db/database.ts';
import { migrate } from '#server/platform/db/migrate.ts';
import { configFromEnvironment } from '#server/config.ts';
import { benchBoard } from './board.ts';
import { benchFanout } from './fanout.ts';
import { type Figure, figure } from './figure.ts';
import { benchFirstScreen } from './first-screen.ts';
import { benchIngest } from './ingest.ts';
import { benchNumbers } from './numbers.ts';
import { benchRuns } from './runs.ts';

/** `npm run bench`: every benchmark with its ratio to its own denominator in this run. Absolute figures depend on the machine. */
const own = new URL(configFromEnvironment().databaseUrl);
const admin = createDatabase(own.href, { connections: 1 });
await admin.raw('create database if not exists ?? character set utf8mb4 collate utf8mb4_unicode_ci', ['lanewright_bench']);
own.pathname = '/lanewright_bench';
const db = createDatabase(own.href);
await migrate(db);
const figures: Figure[] = [];
try {
  figures.push(...(await benchIngest(db)), ...(await benchFanout(db)));
  const board = await benchBoard();
  figures.push(figure(`board, ${board.lanes} lanes × 5 updates/s ÷ bare page that takes the same messages`, 'ms/s of main thread', board.msPerSecond, board.bareMsPerSecond));
  figures.push(...benchFirstScreen());
  figures.push(...[...benchNumbers(), ...benchRuns()].map((row) => ({ unit: '', ...row })));
} finally {
  await db.destroy();
  await admin.raw('drop database if exists lanewright_bench');
  await admin.destroy();
}
const shown = (value: number): string => (value >= 100 ? value.toFixed(0) : value.toPrecision(3));
for (const row of figures) console.log(`${shown(row.ratio).padStart(9)}  ${row.name}: ${shown(row.value)} ÷ ${shown(row.denominator)} ${row.unit}`);
