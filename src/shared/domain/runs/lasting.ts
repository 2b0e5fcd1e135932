/** What a lane machine carries and spends; volumes in µL, battery in hundredths of a percent. All integers. */
export type Store = 'tankA' | 'tankB' | 'cleaner' | 'waste' | 'battery';

export const STORES: readonly Store[] = ['tankA', 'tankB', 'cleaner', 'waste', 'battery'];

export type Amounts = Partial<Record<Store, number>>;

/** Waste counts the other way in life; here its level is the room left, so that every store runs down to its reserve. */
export interface StoreState {
  level: number;
  capacity: number;
  /** What must stay in it; 0 when left out. */
  reserve?: number;
}

export type Stores = Partial<Record<Store, StoreState>>;

export interface LaneUse {
  lane: number;
  use: Amounts;
}

export interface RefillStop {
  /** Before this lane, and its place in the order (from 0). */
  lane: number;
  at: number;
  /** The stores that would not have lasted this lane; all of them are made good at the stop. */
  because: Store[];
}

export interface Lasting {
  /** Where each store would run out without any refill; a store that lasts is absent. */
  runsOut: Partial<Record<Store, { lane: number; at: number; short: number }>>;
  /** The fewest stops for the whole order. */
  refills: RefillStop[];
  /** Lanes that need more of a store than it holds when full: nothing helps but a smaller pattern. */
  impossible: { lane: number; store: Store; need: number; holds: number }[];
  /** Levels after the last lane, with the stops made. */
  levelsAfter: Amounts;
}

const room = (state: StoreState): number => state.level - (state.reserve ?? 0);
const full = (state: StoreState): number => state.capacity - (state.reserve ?? 0);

function firstShortage(store: Store, state: StoreState, lanes: readonly LaneUse[]): { lane: number; at: number; short: number } | null {
  let left = room(state);
  for (const [at, { lane, use }] of lanes.entries()) {
    left -= use[store] ?? 0;
    if (left < 0) return { lane, at, short: -left };
  }
  return null;
}

/**
 * Tanks, cleaner, waste and battery along an ordered run. A stop makes everything good (tanks filled,
 * waste emptied, battery charged or changed); stopping only where the next lane would not be finished
 * is the fewest possible, since no plan can get further between two stops. A lane never begins on less
 * than it needs.
 */
export function willItLast(stores: Stores, lanes: readonly LaneUse[]): Lasting {
  const known = STORES.flatMap((store) => (stores[store] ? [{ store, state: stores[store] }] : []));
  const result: Lasting = { runsOut: {}, refills: [], impossible: [], levelsAfter: {} };
  for (const { store, state } of known) {
    const out = firstShortage(store, state, lanes);
    if (out) result.runsOut[store] = out;
  }
  const left = new Map(known.map(({ store, state }) => [store, room(state)]));
  for (const [at, { lane, use }] of lanes.entries()) {
    const because: Store[] = [];
    for (const { store, state } of known) {
      const need = use[store] ?? 0;
      if (need > full(state)) result.impossible.push({ lane, store, need, holds: full(state) });
      else if (need > (left.get(store) ?? 0)) because.push(store);
    }
    if (because.length > 0) {
      result.refills.push({ lane, at, because });
      for (const { store, state } of known) left.set(store, full(state));
    }
    for (const { store } of known) left.set(store, Math.max(0, (left.get(store) ?? 0) - (use[store] ?? 0)));
  }
  for (const { store, state } of known) result.levelsAfter[store] = (left.get(store) ?? 0) + (state.reserve ?? 0);
  return result;
}
