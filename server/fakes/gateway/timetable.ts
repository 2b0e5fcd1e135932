import { instantOfWall, weekdayOf } from '../../../src/shared/domain/business-day.ts';
import type { LaneUseKind } from '../../../src/shared/domain/equipment.ts';
import { HOUSE, type InventedLeague, lanesOfRange, leaguesOn, PARTY_LABELS, WARM_UP_MINUTES } from './invented-house.ts';
import { random } from './random.ts';

export const MINUTE = 60_000;
/** Seconds a frame on one lane, with the walk and the wait. */
export const FRAME_SECONDS = 68;

/** People on one lane, as planned; a league ends when its frames are bowled. */
export interface Block {
  lane: number;
  /** Which block of the lane's day: part of its events' names. */
  place: string;
  kind: LaneUseKind;
  label: string | null;
  from: number;
  /** Latest end of open play and parties; forecast for a league. */
  to: number;
  /** Frames to bowl on the lane; null: until `to`. */
  frames: number | null;
  bowlers: number;
  warmUpMs: number;
}

export interface NightKey {
  seed: number;
  date: string;
  zone: string;
  /** Nights since the demo began: negative in its history. The same week and weekday draw the same night. */
  index: number;
}

export const words = (night: NightKey): (string | number)[] => [night.seed, Math.floor(night.index / 7), weekdayOf(night.date)];

const noons = new Map<string, number>();

/** Instant of so many minutes after midnight. The house is open from morning to midnight, when no zone moves its clocks: noon anchors all. */
export function wallInstant(night: NightKey, minutes: number): number {
  const key = `${night.date} ${night.zone}`;
  let noon = noons.get(key);
  if (noon === undefined) {
    const wall = instantOfWall(night.date, 720, night.zone);
    if (!wall.ok) throw new Error(`no noon on ${key}`);
    noon = wall.instant;
    noons.set(key, noon);
  }
  return noon + (minutes - 720) * MINUTE;
}

/** Frames of one league on one lane: bowlers of the pair × games × 10 ÷ 2. */
export const leagueFrames = (league: InventedLeague): number => league.teamSize * 2 * league.games * 5;

/** League play on each of its lanes. */
export function leagueBlocks(night: NightKey): Block[] {
  return leaguesOn(weekdayOf(night.date)).flatMap((league) => {
    const from = wallInstant(night, league.start - WARM_UP_MINUTES);
    const frames = leagueFrames(league);
    const to = from + WARM_UP_MINUTES * MINUTE + frames * FRAME_SECONDS * 1000;
    return lanesOf(league).map((lane) => ({ lane, place: league.slot, kind: 'league' as const, label: league.name, from, to, frames, bowlers: league.teamSize, warmUpMs: WARM_UP_MINUTES * MINUTE }));
  });
}

export const lanesOf = (league: InventedLeague): number[] => lanesOfRange(...league.lanes);

/** How full the house is with open play, by hour of the evening and weekday. */
function appetite(hour: number, weekend: boolean): number {
  const shape = hour < 12 ? 0.12 : hour < 15 ? 0.28 : hour < 17 ? 0.45 : hour < 21 ? 0.72 : hour < 23 ? 0.5 : 0.15;
  return Math.min(0.95, shape * (weekend ? 1.35 : 1));
}

/** Open play and parties in what leagues and lane care leave free; lanes 13–18 fill first. */
export function openBlocks(night: NightKey, taken: readonly { lane: number; from: number; to: number }[]): Block[] {
  const weekend = weekdayOf(night.date) >= 6;
  const blocks: Block[] = [];
  for (let lane = 1; lane <= HOUSE.lanes; lane += 1) {
    const draw = random(...words(night), 'open', lane);
    const mine = taken.filter((t) => t.lane === lane);
    let minute = HOUSE.opensAt + draw.whole(0, 40);
    while (minute < HOUSE.closesAt - 60) {
      const length = draw.whole(50, 95);
      const from = wallInstant(night, minute);
      const party = draw.chance(weekend ? 0.3 : 0.1);
      const bowlers = draw.whole(2, party ? 6 : 4);
      const label = party ? draw.pick(PARTY_LABELS) : null;
      const eager = lane >= 13 && lane <= 18 ? 1.25 : 0.8;
      const wanted = draw.chance(appetite(minute / 60, weekend) * eager);
      const to = freeUntil(mine, from, from + length * MINUTE);
      const worth = wanted && to - from >= 35 * MINUTE;
      if (worth) blocks.push({ lane, place: `open${minute}`, kind: party ? 'party' : 'open', label, from, to, frames: null, bowlers, warmUpMs: 0 });
      minute += worth ? Math.round((to - from) / MINUTE) + draw.whole(4, 15) : draw.whole(15, 35);
    }
  }
  return blocks;
}

/** End of the free time that begins at `from`, at most `to`; `from` itself when the lane is taken. */
function freeUntil(taken: readonly { from: number; to: number }[], from: number, to: number): number {
  const margin = 12 * MINUTE;
  return taken.reduce((end, t) => (t.from - margin < end && t.to + 3 * MINUTE > from ? Math.max(from, Math.min(end, t.from - margin)) : end), to);
}
