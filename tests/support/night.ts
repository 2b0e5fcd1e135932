import type { DeviceData } from '#shared/domain/journal/fact.ts';

/** A device event of a made-up night; `time` in epoch ms, data as the folds read it. */
export type NightEvent = { [T in keyof DeviceData]: { type: T; data: DeviceData[T]; time: number; source: string; id: string } }[keyof DeviceData];

/** Somebody acts on the call that an event raised. */
export interface NightAct {
  at: number;
  /** Id of the event. */
  raise: string;
  what: 'acknowledge' | 'on-lane' | 'clear';
}

export interface Night {
  lanes: number;
  from: number;
  events: NightEvent[];
  acts: NightAct[];
}

/** Mulberry32 (public domain): the same seed gives the same night. */
export function randomOf(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const MIN = 60_000;
const LANES = 16;
/** Tuesday 12 May 2026, 17:00 UTC. */
export const NIGHT_FROM = Date.UTC(2026, 4, 12, 17);
const NIGHT_MS = 8 * 60 * MIN;
const EQUIPMENT = ['ball-return', 'ball-lift', 'foul-unit', 'scoring', 'masking', 'power', 'bumpers', 'motion-sensor'] as const;
const USES = ['league', 'tournament', 'open', 'party', 'warmup', 'coaching', 'maintenance', 'unknown'] as const;
const SOURCES = ['gateway/a', 'gateway/b', 'gateway/\u{1F3B3}', 'gateway/\uFFFD'];

/** Which calls mechanics take notice of, and what share of them. */
export interface Answered {
  is: (event: NightEvent) => boolean;
  share: number;
}
const ANY_CALL: Answered = { is: () => true, share: 0.15 };
/** Calls that no device event ends: whether somebody may still act on one doesn't hang on what has arrived. */
export const ASKED_AT_THE_LANE: Answered = { is: (event) => event.type === 'call.requested' && event.data.equipment !== undefined && event.data.equipment !== 'pinsetter', share: 0.8 };

/**
 * A night of at least `count` events of every type, with people who acknowledge calls, reach lanes and clear: each act on a call whose
 * raise came before it. Times are coarse, so that many events share a millisecond.
 */
export function aNight(seed: number, count = 3_000, answered: Answered = ANY_CALL): Night {
  const random = randomOf(seed);
  const between = (low: number, high: number) => low + Math.floor(random() * (high - low + 1));
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)] as T;
  const lane = () => between(1, LANES);
  const maybe = <T>(value: T): T | undefined => (random() < 0.5 ? value : undefined);
  const run = () => ({ machine: pick(['M1', 'M2']), run: `R${between(1, 6)}` });

  const make: Record<keyof DeviceData, (time: number) => DeviceData[keyof DeviceData]> = {
    'lane.opened': () => ({ lane: lane(), use: maybe(pick(USES)), bowlers: maybe(between(1, 8)), label: maybe(pick(['Owls', 'Ada', 'Hut 7'])), bumpers: maybe(random() < 0.5) }),
    'lane.closed': () => ({ lane: lane() }),
    'lane.moved': () => ({ from: lane(), to: lane() }),
    'lane.counted': () => ({ lane: lane(), deliveries: maybe(between(0, 9)), cycles: maybe(between(0, 9)), frames: maybe(between(0, 5)), games: maybe(between(0, 1)), basis: maybe(pick(['scored', 'estimated'] as const)) }),
    'game.progress': () => ({ lane: lane(), game: between(1, 3), frame: between(1, 10) }),
    'pinsetter.on': () => ({ lane: lane() }),
    'pinsetter.off': () => ({ lane: lane() }),
    'pinsetter.stopped': () => ({ lane: lane(), reason: pick(['fault', 'fault', 'fault', 'power', 'unknown'] as const), code: maybe('E1'), pins: maybe([7, 10]) }),
    'pinsetter.restarted': () => ({ lane: lane() }),
    'equipment.faulted': () => ({ equipment: pick(EQUIPMENT), lane: lane(), text: maybe('stuck') }),
    'equipment.restored': () => ({ equipment: pick(EQUIPMENT), lane: lane() }),
    'call.requested': () => ({ lane: lane(), equipment: maybe(pick(['pinsetter', 'console', 'channel'] as const)), text: maybe('please') }),
    'run.started': () => ({ ...run(), pattern: maybe('house'), revision: maybe(1), lanes: maybe([1, 2, 3]) }),
    'run.lane.dressed': (time) => ({ ...run(), lane: lane(), startedAt: time - 3 * MIN, finishedAt: time - MIN, conditionerMl: maybe({ a: 12.5, b: maybe(2) }), measured: maybe(true) }),
    'run.lane.skipped': () => ({ ...run(), lane: lane(), reason: 'occupied' }),
    'run.finished': run,
    'run.aborted': () => ({ ...run(), lane: maybe(lane()), reason: 'belt' }),
    'machine.levels': () => ({ machine: pick(['M1', 'M2']), tankAMl: maybe(between(0, 900)), cleanerMl: maybe(between(0, 9_000)), batteryPct: maybe(between(0, 100)) }),
    'gateway.started': () => ({ queued: maybe(1) }),
    'gateway.heartbeat': () => ({ uptimeS: maybe(60) }),
  };
  const often: (keyof DeviceData)[] = [...Array<'lane.counted'>(20).fill('lane.counted'), ...Array<'game.progress'>(8).fill('game.progress'), ...(Object.keys(make) as (keyof DeviceData)[])];
  const kinds = Object.keys(make) as (keyof DeviceData)[];
  const events = Array.from({ length: count }, (_, i) => {
    const type = i < kinds.length ? (kinds[i] as keyof DeviceData) : pick(often);
    const time = NIGHT_FROM + between(0, NIGHT_MS / 250) * 250;
    return { type, data: clean(make[type](time)), time, source: pick(SOURCES), id: `e${i}` } as NightEvent;
  });
  return { lanes: LANES, from: NIGHT_FROM, events, acts: actsOn(events, random, answered) };
}

/** JSON has no undefined. */
const clean = (data: object): object => JSON.parse(JSON.stringify(data)) as object;

const keyOf = (event: NightEvent): string | null => {
  if (event.type !== 'pinsetter.stopped' && event.type !== 'call.requested' && event.type !== 'equipment.faulted') return null;
  const { lane } = event.data;
  const equipment = event.type === 'pinsetter.stopped' ? (event.data.reason === 'power' ? 'power' : 'pinsetter') : (event.data.equipment ?? 'pinsetter');
  if (equipment === 'power') return 'power';
  return equipment === 'ball-return' || equipment === 'ball-lift' ? `${Math.ceil(lane / 2)}/${equipment}` : `${lane}/${equipment}`;
};

/** A mechanic takes notice of some raises, unless somebody is at that call already: mine, on lane, cleared. */
function actsOn(events: readonly NightEvent[], random: () => number, answered: Answered): NightAct[] {
  const busyUntil = new Map<string, number>();
  const acts: NightAct[] = [];
  for (const event of [...events].sort((a, b) => a.time - b.time)) {
    const key = keyOf(event);
    if (!key || !answered.is(event) || random() > answered.share || event.time <= (busyUntil.get(key) ?? 0)) continue;
    // Odd milliseconds: no event shares them, and no two acts do.
    const begin = event.time + 1 + 2 * acts.length;
    const times = [begin + 30_000, begin + 90_000, begin + 240_000];
    acts.push(...(['acknowledge', 'on-lane', 'clear'] as const).map((what, i) => ({ at: times[i] as number, raise: event.id, what })));
    busyUntil.set(key, begin + 240_000);
  }
  return acts.sort((a, b) => a.at - b.at);
}

/** One thing that happens at the server: a batch of events arrives, or somebody acts. */
export type Step = { at: number; events: NightEvent[] } | { at: number; act: NightAct };

/**
 * The night as it reaches the server: in its order; or late, repeated and shuffled as far as causes allow: nothing arrives before it
 * happened, and nobody acts on a call that hasn't arrived.
 */
export function deliveries(night: Night, seed: number, shuffled: boolean, size = 120): Step[] {
  const random = randomOf(seed + 1_000_003);
  const firstAct = new Map<string, number>();
  for (const act of night.acts) firstAct.set(act.raise, Math.min(act.at, firstAct.get(act.raise) ?? Infinity));
  const arrivals = night.events.flatMap((event) => {
    const chance = random();
    const late = random() * (chance < 0.003 ? 180 * MIN : chance < 0.03 ? 15 * MIN : 10_000);
    const latest = (firstAct.get(event.id) ?? Infinity) - 1;
    const at = Math.min(latest, event.time + (shuffled ? late : 0));
    const twice = shuffled && random() < 0.1 ? [{ event, at: at + random() * 60 * MIN }] : [];
    return [{ event, at }, ...twice];
  }).sort((a, b) => a.at - b.at || (shuffled ? 0 : a.event.time - b.event.time));
  const steps: Step[] = [];
  const acts = [...night.acts];
  let batch: NightEvent[] = [];
  const flush = (at: number) => {
    if (batch.length > 0) steps.push({ at, events: batch });
    batch = [];
  };
  for (const { event, at } of arrivals) {
    for (let act = acts[0]; act && act.at <= at; act = acts[0]) {
      flush(act.at);
      steps.push({ at: act.at, act });
      acts.shift();
    }
    batch.push(event);
    if (batch.length >= size) flush(at);
  }
  flush(arrivals.at(-1)?.at ?? night.from);
  for (const act of acts) steps.push({ at: act.at, act });
  return steps;
}

/** Fields that say how something arrived, not what happened: ids of raises, sequence numbers, received times. */
const OF_ARRIVAL = new Set(['receivedAt', 'seq', 'n', 'epoch', 'version', 'raises', 'id']);

/** JSON with sorted keys, without what belongs to the arrival; `names` replaces ids that differ between two runs. */
export function canonical(value: unknown, names: Readonly<Record<string, string>> = {}): string {
  return JSON.stringify(value, (key, inner: unknown) => {
    if (OF_ARRIVAL.has(key)) return undefined;
    if (typeof inner === 'string') return names[inner] ?? inner;
    if (typeof inner !== 'object' || inner === null || Array.isArray(inner)) return inner;
    return Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)));
  });
}
