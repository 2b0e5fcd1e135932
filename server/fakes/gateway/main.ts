import { parseArgs } from 'node:util';
import { configFromEnvironment } from '../../config.ts';
import { businessDayAt, instantOfWall } from '../../../src/shared/domain/business-day.ts';
import { readPlan } from './plan-file.ts';
import { live, replay } from './player.ts';

/**
 * The fake gateway, a process of its own that speaks only the public ingest API with a key.
 * `--demo`: lives on in the demo's house. Else replays one night: `--seed N --speed X --from T` (an instant, or HH:MM of today's
 * business day in the demo's zone), and stops at now.
 */
const { values } = parseArgs({
  options: { 'demo': { type: 'boolean' }, 'seed': { type: 'string' }, 'speed': { type: 'string', default: '60' }, 'from': { type: 'string' } },
});

const stop = new AbortController();
for (const event of ['disconnect', 'SIGTERM', 'SIGINT'] as const) process.on(event, () => stop.abort());

const config = configFromEnvironment();
const plan = readPlan(config.dataDir);
const tonight = { plan, url: `http://127.0.0.1:${config.port}`, dataDir: config.dataDir, stop: stop.signal };
if (values.demo) {
  await live(tonight);
} else {
  const from = startOf(values.from ?? null);
  const sent = await replay(tonight, { seed: numberOf('seed', values.seed ?? String(plan.seed)), speed: numberOf('speed', values.speed), from });
  console.log(`${sent} events told since ${new Date(from).toISOString()}.`);
}

function numberOf(name: string, text: string): number {
  const value = Number(text);
  if (!Number.isFinite(value) || value <= 0) throw new Error(`--${name} ${text}: a number above 0 is needed.`);
  return value;
}

function startOf(text: string | null): number {
  const day = businessDayAt(Date.now(), plan.zone);
  if (text === null) return day.from;
  const wall = /^(\d{1,2}):(\d{2})$/.exec(text);
  const instant = wall ? instantOfWall(day.date, Number(wall[1]) * 60 + Number(wall[2]), plan.zone) : null;
  const from = instant?.ok ? instant.instant : Date.parse(text);
  if (Number.isNaN(from)) throw new Error(`--from ${text}: an instant (2026-05-14T18:00:00Z) or a time (18:00) is needed.`);
  return from;
}
