import { weekdayOf } from '../../../src/shared/domain/business-day.ts';
import { type DeviceEvent, teller } from './events.ts';
import { type InventedMachine, lanesOfRange, leaguesOn, MACHINES, SOURCES } from './invented-house.ts';
import { random } from './random.ts';
import { MINUTE, type NightKey, wallInstant, words } from './timetable.ts';

/** One run of a lane machine as it will happen. */
export interface CareRun {
  run: string;
  machine: InventedMachine;
  pattern: string | null;
  lanes: number[];
  from: number;
  /** Position in `lanes` at which the machine breaks off; null: it doesn't. */
  breaksAt: number | null;
}

const [heron, wren] = MACHINES;
export const REVISION = 3;

/** Where tonight is anchored to the first start: the machine is at work then, and a lane breaks off a little later. */
export interface Anchor {
  at: number;
}

/** Lane care of one day: all lanes in the morning, each league's lanes before it, the early league's lanes again for the late one. */
export function careOf(night: NightKey, anchor: Anchor | null): CareRun[] {
  const leagues = new Map(leaguesOn(weekdayOf(night.date)).map((l) => [l.slot, l]));
  const draw = random(...words(night), 'care');
  const code = (n: number) => `${night.date.slice(5).replace('-', '')}-${n}`;
  const runs: CareRun[] = [
    { run: code(1), machine: heron, pattern: 'house', lanes: lanesOfRange(1, 16), from: wallInstant(night, 9 * 60), breaksAt: null },
    { run: code(2), machine: wren, pattern: 'house', lanes: lanesOfRange(17, 32), from: wallInstant(night, 9 * 60 + 5), breaksAt: null },
  ];
  if (draw.chance(0.35)) runs.push({ run: code(3), machine: wren, pattern: null, lanes: [17, 18], from: wallInstant(night, 16 * 60 + 12), breaksAt: null });
  const early = leagues.get('early');
  const trios = leagues.get('trios');
  const owls = leagues.get('owls');
  const late = leagues.get('late');
  if (early) {
    const lanes = lanesOfRange(...early.lanes);
    const usual = wallInstant(night, 18 * 60 + 4);
    const latest = anchor ? anchor.at - 4 * MINUTE - lanes.length * heron.pace * 1000 : usual;
    runs.push({ run: code(4), machine: heron, pattern: early.pattern, lanes, from: Math.min(usual, latest), breaksAt: null });
  }
  if (trios) runs.push({ run: code(5), machine: wren, pattern: trios.pattern, lanes: lanesOfRange(...trios.lanes), from: wallInstant(night, 18 * 60 + 18), breaksAt: null });
  if (owls) runs.push(...owlsCare(night, owls.lanes, owls.pattern, anchor, draw.chance(0.12), code));
  if (late) runs.push({ run: code(8), machine: wren, pattern: late.pattern, lanes: lanesOfRange(...late.lanes), from: wallInstant(night, 21 * 60 + 18), breaksAt: null });
  return runs;
}

function owlsCare(night: NightKey, range: readonly [number, number], pattern: string, anchor: Anchor | null, breaks: boolean, code: (n: number) => string): CareRun[] {
  const lanes = lanesOfRange(...range);
  const from = anchor ? anchor.at - 2.2 * MINUTE : wallInstant(night, 19 * 60 + 34);
  const broken = anchor !== null || breaks;
  const first: CareRun = { run: code(6), machine: heron, pattern, lanes, from, breaksAt: broken ? lanes.length - 2 : null };
  if (!broken) return [first];
  const again = lanes.slice(-2);
  const redo = Math.max(from + lanes.length * heron.pace * 1000 + 12 * MINUTE, wallInstant(night, 19 * 60 + 48));
  return [first, { run: code(7), machine: heron, pattern, lanes: again, from: redo, breaksAt: null }];
}

const ML_A = 19.6;
const ML_B = 4.9;

/** What the machines' gateway tells of a run. */
export function careEvents(night: NightKey, care: CareRun): DeviceEvent[] {
  const tell = teller(SOURCES.laneCare, `${night.date}-run-${care.run}`);
  const draw = random(...words(night), 'run', care.run);
  const { machine, run, lanes } = care;
  const known = care.pattern === null ? {} : { pattern: care.pattern, revision: REVISION };
  const events = [tell(care.from, 'run.started', { machine: machine.code, run, ...known, lanes })];
  let at = care.from + 8000;
  let tankA = machine.tankMl * (0.62 + draw.next() * 0.3);
  for (const [place, lane] of lanes.entries()) {
    const startedAt = at;
    const finishedAt = at + machine.pace * 1000 * (0.94 + draw.next() * 0.12) - 12_000;
    if (place === care.breaksAt) {
      events.push(tell(startedAt + 48_000, 'run.aborted', { machine: machine.code, run, lane, reason: 'squeegee did not drop' }));
      return events;
    }
    const a = round1(ML_A * (0.98 + draw.next() * 0.04));
    const b = machine.products === 2 ? { b: round1(ML_B * (0.98 + draw.next() * 0.04)) } : {};
    tankA -= a;
    events.push(tell(finishedAt, 'run.lane.dressed', { machine: machine.code, run, lane, startedAt: Math.round(startedAt), finishedAt: Math.round(finishedAt), conditionerMl: { a, ...b }, cleanerMl: round1(38 + draw.next() * 3), measured: machine.products === 2 }));
    if (place % 4 === 3) events.push(tell(finishedAt + 400, 'machine.levels', { machine: machine.code, tankAMl: Math.round(tankA), batteryPct: Math.round(92 - place * 2.1), wasteMl: 600 + place * 40, cleanerMl: 5200 - place * 40 }));
    at = finishedAt + 12_000;
  }
  events.push(tell(at, 'run.finished', { machine: machine.code, run }));
  return events;
}

const round1 = (value: number): number => Math.round(value * 10) / 10;

/** Lanes that care keeps free of people: from a little before till the end. */
export const careTakes = (runs: readonly CareRun[]): { lane: number; from: number; to: number }[] =>
  runs.flatMap((r) => r.lanes.map((lane) => ({ lane, from: r.from - MINUTE, to: r.from + r.lanes.length * r.machine.pace * 1000 + MINUTE })));
