import { describe, expect, it } from 'vitest';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { house, screen } = await stage((server) => floorHouse(server, 32), { keepScreens: true });
const page = await screen(house.desk);
await page.goto(house.at('/floor'));
await page.locator('[data-live=live]').waitFor();

type Told = [type: keyof DeviceData, data: object];
interface Row {
  /** What is told, the last one being looked at. */
  events: Told[];
  lane: number;
  before?: RegExp;
  /** Part of the accessible name that appears. */
  says: RegExp;
  /** Mark on the machine, where it changes. */
  mark?: string;
}
const iso = (at: number) => new Date(at).toISOString();
const machine = 'm1';

/** Each type of device event: which words and mark of which lane it changes. `before` is on the screen first. */
const ROWS: [name: string, row: Row][] = [
  ['pinsetter.on', { events: [['pinsetter.on', { lane: 1 }]], lane: 1, says: /pinsetter on/, mark: 'running' }],
  ['pinsetter.off', { events: [['pinsetter.off', { lane: 2 }]], lane: 2, says: /pinsetter off/, mark: 'off' }],
  ['pinsetter.stopped', { events: [['pinsetter.stopped', { lane: 3, pins: [7, 10] }]], lane: 3, says: /call unanswered .*pinsetter stopped .*pins 7 10 stand/, mark: 'unanswered' }],
  ['pinsetter.restarted', { events: [['pinsetter.stopped', { lane: 4 }], ['pinsetter.restarted', { lane: 4 }]], lane: 4, before: /unanswered/, says: /runs again, pinsetter: cause missing/, mark: 'cause-missing' }],
  ['lane.opened', { events: [['lane.opened', { lane: 5, use: 'league', label: 'Thursday Scratch' }]], lane: 5, says: /league Thursday Scratch/ }],
  ['lane.opened with bumpers', { events: [['lane.opened', { lane: 6, use: 'party', bumpers: true }]], lane: 6, says: /party.*bumpers up/ }],
  ['lane.closed', { events: [['lane.opened', { lane: 7, use: 'open' }], ['lane.closed', { lane: 7 }]], lane: 7, before: /open play/, says: /^Lane 7, free/ }],
  ['lane.moved, the lane left', { events: [['lane.opened', { lane: 8, use: 'open' }], ['lane.moved', { from: 8, to: 9 }]], lane: 8, before: /open play/, says: /^Lane 8, free/ }],
  ['lane.moved, the lane reached', { events: [['lane.opened', { lane: 10, use: 'open', label: 'Marchbank' }], ['lane.moved', { from: 10, to: 11 }]], lane: 11, says: /open play Marchbank/ }],
  ['game.progress', { events: [['lane.opened', { lane: 13, use: 'open' }], ['game.progress', { lane: 13, game: 2, frame: 6 }]], lane: 13, before: /open play/, says: /game 2 frame 6/ }],
  ['equipment.faulted', { events: [['equipment.faulted', { lane: 14, equipment: 'foul-unit' }]], lane: 14, says: /call unanswered .*, foul unit/, mark: 'unanswered' }],
  ['equipment.faulted of a pair', { events: [['equipment.faulted', { lane: 15, equipment: 'ball-return' }]], lane: 16, says: /ball not returned/, mark: 'unanswered' }],
  ['equipment.restored', { events: [['equipment.faulted', { lane: 17, equipment: 'scoring' }], ['equipment.restored', { lane: 17, equipment: 'scoring' }]], lane: 17, before: /unanswered/, says: /runs again, scoring: cause missing/, mark: 'cause-missing' }],
  ['call.requested', { events: [['call.requested', { lane: 18, equipment: 'bumpers' }]], lane: 18, says: /call unanswered .*, bumpers/, mark: 'unanswered' }],
  ['run.started', { events: [['run.started', { machine, run: 'r1', pattern: 'house', revision: 1, lanes: [19, 20] }]], lane: 19, says: /being dressed, run r1/ }],
  ['run.lane.dressed', { events: [['run.lane.dressed', { machine, run: 'r1', lane: 19, startedAt: iso(Date.now() - 90_000), finishedAt: iso(Date.now()) }]], lane: 19, before: /being dressed/, says: /film 40 ft/ }],
  ['run.lane.dressed, the machine goes on', { events: [], lane: 20, says: /being dressed, run r1/ }],
  ['run.lane.skipped', { events: [['run.lane.skipped', { machine, run: 'r1', lane: 20, reason: 'people on it' }]], lane: 20, before: /being dressed/, says: /film unknown/ }],
  ['run.aborted', { events: [['run.started', { machine: 'another', run: 'r2', pattern: 'house', revision: 1, lanes: [21] }], ['run.aborted', { machine: 'another', run: 'r2', lane: 21, reason: 'battery' }]], lane: 21, before: /being dressed/, says: /broken off: clean and redo/ }],
];

/** Waits until a lane's name says it and its machine shows the mark; gives the ms it took. */
async function shows(n: number, says: RegExp, mark?: string): Promise<number> {
  const began = Date.now();
  await page.waitForFunction(
    ({ of, source, wanted }) => {
      const strip = document.querySelector<HTMLElement>(`[data-lane="${of}"]`);
      return new RegExp(source).test(strip?.getAttribute('aria-label') ?? '') && (wanted === undefined || strip?.dataset['mark'] === wanted);
    },
    { of: n, source: says.source, wanted: mark },
    { polling: 50, timeout: 15_000 },
  );
  return Date.now() - began;
}

describe('each device event changes its lane on the screen within a second', () => {
  it.each(ROWS)('%s', async (_name, { events, lane: n, before, says, mark }) => {
    for (const [type, data] of events.slice(0, -1)) await house.device(type, data);
    if (before) await shows(n, before);
    const last = events.at(-1);
    if (last) await house.device(...last);
    expect(await shows(n, says, mark)).toBeLessThan(1000);
  });

  it('lane.counted wears the film; its length is the pattern’s on sixty feet', async () => {
    await house.device('run.started', { machine, run: 'r3', pattern: 'house', revision: 1, lanes: [23] });
    await house.device('run.lane.dressed', { machine, run: 'r3', lane: 23, startedAt: iso(Date.now() - 90_000), finishedAt: iso(Date.now() - 1000) });
    await shows(23, /film 40 ft/);
    await house.device('lane.counted', { lane: 23, deliveries: 41 });
    expect(await shows(23, /film 40 ft 41 deliveries/)).toBeLessThan(1000);
    const strip = page.locator('[data-lane="23"]');
    expect(await strip.locator('.balls').textContent()).toBe('41');
    const share = await strip.evaluate((lane) => (lane.querySelector('.film')?.getBoundingClientRect().height ?? 0) / (lane.querySelector('.boards')?.clientHeight ?? 1));
    expect(share).toBeCloseTo(40 / 60, 1);
  });

  it('run.finished: the run no longer holds its lanes', async () => {
    await house.device('run.started', { machine: 'third', run: 'r4', pattern: 'house', revision: 1, lanes: [25, 26] });
    await page.getByText('Run r4').waitFor();
    await house.device('run.finished', { machine: 'third', run: 'r4' });
    await page.getByText('Run r4').waitFor({ state: 'detached' });
    await shows(25, /film unknown/);
  });

  it('machine.levels: of a machine of the centre', async () => {
    await house.device('machine.levels', { machine, tankAMl: 1480, batteryPct: 76 });
    await page.getByText(/A 1.480 mL · battery 76%/).waitFor();
  });

  it('power is one call of the house, and holds no lane', async () => {
    await house.device('equipment.faulted', { lane: 27, equipment: 'power' });
    await page.getByText('Power dip in the house').waitFor();
    expect(await page.locator('[data-lane="28"]').getAttribute('data-mark')).not.toBe('unanswered');
  });
});
