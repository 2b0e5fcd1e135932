import { type DeviceEvent, teller } from './events.ts';
import { SOURCES, STOP_TEXTS, STOPS_PER_THOUSAND } from './invented-house.ts';
import { type Random, random } from './random.ts';
import { type Block, FRAME_SECONDS, MINUTE, type NightKey, words } from './timetable.ts';

/** Seconds between two counter readings at an instant: coarse in the past, fine while somebody watches. */
export type Grain = (instant: number) => number;

/** Between two balls of a frame. */
const BALL_MS = 14_000;

interface Bowled {
  at: number;
  deliveries: number;
  frame: boolean;
}

interface Stop {
  from: number;
  to: number;
  what: (typeof STOP_TEXTS)[number];
  pins: number[];
}

/** Everything that one lane tells of one block of play: opening, counts, progress, stops and restarts, closing. */
export function playEvents(night: NightKey, block: Block, grain: Grain, forced: readonly { from: number; to: number }[]): DeviceEvent[] {
  const tell = teller(SOURCES.backRoom, `${night.date}-lane-${block.lane}-${block.place}`);
  const draw = random(...words(night), 'play', block.lane, block.place, block.kind);
  const { bowled, stops, end } = bowl(block, draw, forced);
  const lane = block.lane;
  const events: DeviceEvent[] = [];
  const party = block.kind === 'party' && block.lane >= 17 && block.lane <= 18 && draw.chance(0.7);
  if (block.warmUpMs > 0) events.push(tell(block.from, 'lane.opened', { lane, use: 'warmup', label: block.label ?? undefined, bowlers: block.bowlers }));
  events.push(tell(block.from + block.warmUpMs, 'lane.opened', { lane, use: block.kind, bowlers: block.bowlers, ...(block.label ? { label: block.label } : {}), ...(block.frames === null ? { until: block.to, bumpers: party } : {}) }));
  for (const stop of stops) {
    events.push(tell(stop.from, 'pinsetter.stopped', { lane, reason: 'fault', code: stop.what[0], text: stop.what[1], pins: stop.pins }));
    events.push(tell(stop.to, 'pinsetter.restarted', { lane }));
  }
  events.push(...readings(block, bowled, grain, tell));
  events.push(tell(end + 90_000, 'lane.closed', { lane }));
  return events;
}

/** Frame by frame: when it was bowled, with how many balls, and whether the machine stopped on it. */
function bowl(block: Block, draw: Random, forced: readonly { from: number; to: number }[]): { bowled: Bowled[]; stops: Stop[]; end: number } {
  const bowled: Bowled[] = [];
  const stops: Stop[] = [];
  const begin = block.from + block.warmUpMs;
  for (let at = block.from + 50_000; block.warmUpMs > 0 && at < begin - 20_000; at += 21_000) bowled.push({ at, deliveries: 1, frame: false });
  const hazard = STOPS_PER_THOUSAND(block.lane) / 1000;
  const due = forced.map((f) => ({ ...f }));
  let at = begin + 25_000;
  let frames = 0;
  while (block.frames === null ? at < block.to - MINUTE : frames < block.frames) {
    at += FRAME_SECONDS * 1000 * (0.7 + draw.next() * 0.6);
    frames += 1;
    const balls = draw.chance(0.24) ? 1 : draw.chance(0.03) ? 3 : 2;
    for (let ball = balls - 1; ball >= 0; ball -= 1) bowled.push({ at: at - ball * BALL_MS, deliveries: 1, frame: ball === 0 });
    const planned = due[0] && due[0].from <= at + FRAME_SECONDS * 1000 ? due.shift() : undefined;
    if (draw.chance(hazard) || planned) {
      const from = planned?.from ?? at + 4000;
      const to = planned?.to ?? from + Math.min(16 * MINUTE, draw.around(135_000, 0.6));
      stops.push({ from, to, what: draw.pick(STOP_TEXTS), pins: standing(draw) });
      at = Math.max(at, to);
    }
  }
  return { bowled, stops, end: at };
}

const standing = (draw: Random): number[] => Array.from({ length: 10 }, (_, i) => i + 1).filter(() => draw.chance(0.35));

type Tell = ReturnType<typeof teller>;

/** Counter readings at the grain, and the game's progress where it is fine enough to be looked at. */
function readings(block: Block, bowled: readonly Bowled[], grain: Grain, tell: Tell): DeviceEvent[] {
  const events: DeviceEvent[] = [];
  let held: Bowled[] = [];
  let since = block.from;
  let frames = 0;
  const flush = (at: number): void => {
    const sum = held.reduce((n, b) => n + b.deliveries, 0);
    const done = held.filter((b) => b.frame).length;
    frames += done;
    if (sum > 0) events.push(tell(at, 'lane.counted', { lane: block.lane, deliveries: sum, cycles: sum, ...(done > 0 ? { frames: done, basis: 'scored' } : {}) }));
    if (done > 0 && block.frames !== null && grain(at) < 120) events.push(tell(at + 300, 'game.progress', { lane: block.lane, ...standingAt(frames, block.bowlers) }));
    held = [];
    since = at;
  };
  for (const ball of bowled) {
    if (ball.at - since > grain(ball.at) * 1000 && held.length > 0) flush(held.at(-1)?.at ?? ball.at);
    held.push(ball);
  }
  if (held.length > 0) flush(held.at(-1)?.at ?? block.to);
  return events;
}

function standingAt(frames: number, bowlers: number): { game: number; frame: number } {
  const rounds = Math.floor((frames - 1) / bowlers);
  return { game: Math.floor(rounds / 10) + 1, frame: (rounds % 10) + 1 };
}
