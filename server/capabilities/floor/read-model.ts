import type { FloorDelta, FloorSnapshot, LaneView } from '#shared/contracts/floor.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { ageingBy } from '#shared/domain/house-rules.ts';
import type { LaneState } from '#shared/domain/floor/state.ts';
import type { Topic } from '#shared/realtime/events.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { HouseAt } from '#server/platform/journal/ledger.ts';
import { type LaneContext, laneView } from './lane-view.ts';
import type { FloorSources } from './sources.ts';

type Parts = Omit<FloorSnapshot, 'epoch' | 'seq' | 'at' | 'centre' | 'lanes'>;

/** Which lists of the floor a touched topic changes. */
const CHANGES: Record<Topic, (keyof Parts | 'lanes')[]> = {
  floor: ['tonight'],
  calls: ['calls', 'tonight', 'sessions'],
  runs: ['runs', 'machines', 'sessions'],
  patterns: ['lanes', 'runs'],
  leagues: ['sessions', 'lanes'],
  sessions: ['sessions'],
  figures: ['tonight'],
  settings: ['gateways', 'machines', 'lanes', 'calls', 'sessions'],
};

/** The whole floor of one house, at its sequence number. */
export async function snapshot(sources: FloorSources, centre: CentreRef, at: HouseAt, now: number): Promise<FloorSnapshot> {
  const context = await laneContext(sources, centre, at, now);
  const parts = await partsOf(sources, centre, at, now, ['calls', 'runs', 'machines', 'gateways', 'tonight', 'business']);
  return {
    epoch: at.epoch, seq: at.seq, at: now,
    centre: { slug: centre.slug, name: centre.name, zone: centre.zone, lanes: centre.lanes },
    ...(parts as Parts),
    sessions: [...context.sessions],
    lanes: at.state.floor.map((lane) => laneView(lane, context)),
  };
}

/** What changed, in absolute values: touched lanes one by one, every other list whole. */
export async function changes(
  sources: FloorSources, centre: CentreRef, at: HouseAt, now: number, touched: { lanes: readonly number[]; topics: readonly Topic[] },
): Promise<Partial<FloorDelta>> {
  const wanted = new Set(touched.topics.flatMap((topic) => CHANGES[topic]));
  const context = await laneContext(sources, centre, at, now);
  const all = wanted.delete('lanes');
  const lanes = at.state.floor.filter((lane) => all || touched.lanes.includes(lane.lane)).map((lane) => laneView(lane, context));
  const sessions = wanted.delete('sessions') ? { sessions: [...context.sessions] } : {};
  const parts = await partsOf(sources, centre, at, now, [...wanted] as (keyof Parts)[]);
  return { ...parts, ...sessions, ...(lanes.length > 0 ? { lanes } : {}) };
}

async function laneContext(sources: FloorSources, centre: CentreRef, at: HouseAt, now: number): Promise<LaneContext> {
  const [sessions, pattern, gateways] = await Promise.all([sources.sessions(centre, at.state, now), sources.patterns(centre), sources.gateways(centre, now)]);
  return {
    now, house: at.state, sessions, pattern, ageing: ageingBy(centre.rules),
    silent: new Set(gateways.filter((g) => g.silent).map((g) => g.id)),
  };
}

async function partsOf(sources: FloorSources, centre: CentreRef, at: HouseAt, now: number, wanted: readonly (keyof Parts)[]): Promise<Partial<Parts>> {
  const makers: { [K in keyof Parts]: () => Promise<Parts[K]> | Parts[K] } = {
    business: () => businessDayAt(now, centre.zone, centre.cut),
    calls: () => Object.values(at.state.calls.open).sort((a, b) => a.raisedAt - b.raisedAt).map((call) => sources.callView(call, at.state, now, centre.rules)),
    runs: () => sources.runBars(centre, at.state, now),
    machines: () => sources.machines(centre, at.state),
    sessions: () => sources.sessions(centre, at.state, now),
    gateways: async () => (await sources.gateways(centre, now)).map(({ id: _id, ...shown }) => shown),
    tonight: () => sources.tonight(centre, at.state, now),
  };
  const made = await Promise.all(wanted.map(async (part) => [part, await makers[part]()] as const));
  return Object.fromEntries(made);
}

/** One lane as screens show it now. */
export async function laneNow(sources: FloorSources, centre: CentreRef, at: HouseAt, lane: LaneState, now: number): Promise<LaneView> {
  return laneView(lane, await laneContext(sources, centre, at, now));
}
