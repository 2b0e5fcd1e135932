import type { Knex } from 'knex';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { addDays, businessDay, businessDayAt, wallOf } from '#shared/domain/business-day.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { careOf } from '../../server/fakes/gateway/care.ts';
import { HOUSE, type InventedLeague, lanesOfRange, leaguesOn, MACHINES, SOURCES, WARM_UP_MINUTES } from '../../server/fakes/gateway/invented-house.ts';
import { nightEvents, type NightKey } from '../../server/fakes/gateway/night.ts';
import { DEMO_PLAN, type DemoPlan } from '../../server/fakes/gateway/plan-file.ts';
import { grainFrom, nightAt } from '../../server/fakes/gateway/player.ts';
import { crewFacts } from './crew.ts';
import type { DemoDoors } from './doors.ts';
import { type Gateways, tellNight } from './history.ts';
import { CAPABILITIES, PATTERNS } from './inventory.ts';
import { markLoaded, wipeHouse } from './marker.ts';
import { demoPeople } from './people.ts';
import { eveningZone } from './zone.ts';

const SEED = 1;
const NIGHTS = 56;
const SEASON_WEEKS = 26;
/** The lane machines' gateway runs fast: the server measures and corrects it. */
const CARE_CLOCK_AHEAD_MS = 74_000;

export interface DemoDeps {
  db: Knex;
  ledger: Ledger;
  dataDir: string;
  publicUrl: string;
  now: number;
  say(text: string): void;
}

type Doors = Omit<DemoDoors, 'answer'>;

/** Loads the demo's centre and its eight weeks, and what the fake gateway needs to go on. A load that was cut off is begun anew. */
export async function loadDemo(deps: DemoDeps, slices: Doors): Promise<void> {
  const { db, now, say } = deps;
  const begun = performance.now();
  await wipeHouse(db, HOUSE.slug);
  const zone = eveningZone(now);
  const today = businessDayAt(now, zone);
  const firstDate = addDays(today.date, -NIGHTS);
  say(`Loading the demo: eight weeks of ${HOUSE.name}, where it is ${clockOf(now, zone)} now.`);
  const certifiedUntil = addDays(today.date, 200);
  const centre = await slices.centre.add({ slug: HOUSE.slug, name: HOUSE.name, zone, lanes: HOUSE.lanes, certifiedUntil });
  await equip(slices, centre);
  const opened = businessDay(firstDate, zone).from;
  const leagues = await season(slices, centre, firstDate, opened);
  const { people, lines } = await demoPeople(slices.accounts, centre, leagues, deps);
  const mechanics = people.filter((p) => p.role === 'mechanic').map((p): Person => ({ kind: 'user', id: p.id, name: p.name }));
  const [backRoom, laneCare] = [await slices.centre.addGateway(centre, 'Back room'), await slices.centre.addGateway(centre, 'Lane care')];
  const gateways: Gateways = { [SOURCES.backRoom]: { id: backRoom.id, name: 'Back room' }, [SOURCES.laneCare]: { id: laneCare.id, name: 'Lane care' } };
  const doors = withAnswers(deps.ledger, slices);
  for (let index = -NIGHTS; index < 0; index += 1) {
    const date = addDays(today.date, index);
    const night: NightKey = { seed: SEED, date, zone, index };
    const events = nightEvents(night, grainFrom(Infinity), null);
    const { to } = businessDay(date, zone);
    await tellNight(doors, centre, gateways, mechanics, { night, events, until: to - 60_000 });
    await doors.numbers.issueQuietly(centre, date, to + 15 * 60_000);
    if (index % 14 === 0) say(`… ${NIGHTS + index} of ${NIGHTS} nights`);
  }
  const plan: DemoPlan = {
    centre: centre.slug, zone, seed: SEED, firstDate: today.date, anchorAt: now,
    gateways: [{ source: SOURCES.backRoom, key: backRoom.key, skewMs: 0 }, { source: SOURCES.laneCare, key: laneCare.key, skewMs: CARE_CLOCK_AHEAD_MS }],
  };
  await tonight(deps, doors, centre, gateways, mechanics, plan);
  writeFileSync(join(deps.dataDir, DEMO_PLAN), JSON.stringify(plan, null, 1), { mode: 0o600 });
  await markLoaded(db, centre.slug, plan.firstDate, now);
  say(`The demo took ${((performance.now() - begun) / 1000).toFixed(1)} s. Sign in with (kept in ${join(deps.dataDir, 'demo-accounts.txt')}):\n${lines.map((l) => `  ${l}`).join('\n')}`);
}

const clockOf = (at: number, zone: string): string => {
  const { minutes } = wallOf(at, zone);
  return `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')} (${zone})`;
};

/** Machines and patterns; the newest revision is the third. */
async function equip({ runs }: Doors, centre: CentreRef): Promise<void> {
  for (const { code, name } of MACHINES) {
    const capabilities = CAPABILITIES[code];
    if (capabilities) await runs.addMachine(centre, { code, name, capabilities });
  }
  for (const { code, name, revisions } of PATTERNS) {
    const [first, ...later] = revisions;
    if (first) await runs.addPattern(centre, { code, name, revision: first, by: 'Ines Quill' });
    for (const revision of later) await runs.revisePattern(centre, { code, revision, by: 'Odell Fenn' });
  }
}

/** Every league of the week with its season; ids by slot. */
async function season({ leagues }: Doors, centre: CentreRef, firstDate: string, now: number): Promise<Map<string, string[]>> {
  const bySlot = new Map<string, string[]>();
  const all = [1, 2, 3, 4, 5, 6, 7].flatMap((weekday) => leaguesOn(weekday).map((league) => ({ league, weekday })));
  for (const { league, weekday } of all) {
    const id = await leagues.createLeague(centre, formOf(league, weekday, firstDate), { now });
    bySlot.set(league.slot, [...(bySlot.get(league.slot) ?? []), id]);
  }
  return bySlot;
}

const formOf = (league: InventedLeague, weekday: number, firstDate: string) => ({
  name: league.name, weekday, startMinutes: league.start, warmUpMinutes: WARM_UP_MINUTES, fromLane: league.lanes[0], toLane: league.lanes[1],
  teams: lanesOfRange(...league.lanes).length, bowlersATeam: league.teamSize, games: league.games, absent: 0, crossesLanes: true, firstDate,
  lastDate: addDays(firstDate, SEASON_WEEKS * 7), skipDates: [], pattern: league.pattern, revision: null, fresh: league.fresh, sanctioned: league.sanctioned,
});

const withAnswers = (ledger: Ledger, slices: Doors): DemoDoors => ({
  ...slices,
  async answer(centre, until, mechanics, words) {
    const { state } = await ledger.read(centre);
    const facts = crewFacts(state.calls, until, mechanics, words);
    if (facts.length > 0) await ledger.decide(centre, () => ({ facts, result: () => undefined }), { now: until, deadlineMs: 60_000 });
  },
});

/** Tonight up to now, and the late league's run as it is planned. */
async function tonight(deps: DemoDeps, doors: DemoDoors, centre: CentreRef, gateways: Gateways, mechanics: readonly Person[], plan: DemoPlan): Promise<void> {
  const { events, from } = nightAt(plan, deps.now);
  const night: NightKey = { seed: plan.seed, date: plan.firstDate, zone: plan.zone, index: 0 };
  await tellNight(doors, centre, gateways, mechanics, { night, events: events.filter((e) => e.time <= deps.now && e.time > from), until: deps.now });
  const late = careOf(night, { at: deps.now }).find((run) => run.from > deps.now + 3_600_000 && run.pattern === 'lock-gate');
  const [by] = mechanics;
  if (!late || !by) return;
  const data = { machine: late.machine.code, run: late.run, pattern: 'lock-gate', revision: 3, lanes: late.lanes, startAt: late.from };
  await deps.ledger.decide(centre, () => ({ facts: [{ type: 'run.planned', data, by }], result: () => undefined }));
}
