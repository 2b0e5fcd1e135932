import { createContext, use, useCallback, useSyncExternalStore } from 'react';
import type { FloorSnapshot, LaneView } from '#shared/contracts/floor.ts';
import type { BoardStore, Part } from './board-store.ts';

export const BoardContext = createContext<BoardStore | null>(null);

export function useBoardStore(): BoardStore {
  const store = use(BoardContext);
  if (!store) throw new Error('the board is used outside its provider');
  return store;
}

/** One list of the floor; null before the first snapshot. Drawn again only when that list changes. */
export function useBoard<K extends Part>(part: K): FloorSnapshot[K] | null {
  const store = useBoardStore();
  const subscribe = useCallback(
    (listener: () => void) => {
      const ends = [store.subscribe(part, listener), store.subscribe('ready', listener)];
      return () => ends.forEach((end) => end());
    },
    [store, part],
  );
  return useSyncExternalStore(subscribe, () => store.snapshot()?.[part] ?? null);
}

/** One lane, and nothing but that lane. */
export function useLane(lane: number): LaneView | null {
  const store = useBoardStore();
  const subscribe = useCallback((listener: () => void) => store.subscribe(`lane:${lane}`, listener), [store, lane]);
  return useSyncExternalStore(subscribe, () => store.lane(lane));
}

/**
 * Something computed over all lanes, as a string: drawn again only when its value changes, not at each delivery.
 * (A string, as snapshots of an external store are compared by identity.)
 */
export function useLanesDigest(digest: (lanes: readonly LaneView[]) => string): string {
  const store = useBoardStore();
  const subscribe = useCallback(
    (listener: () => void) => {
      const ends = [store.subscribe('ready', listener), store.subscribe('lanes', listener)];
      return () => ends.forEach((end) => end());
    },
    [store],
  );
  return useSyncExternalStore(subscribe, () => digest(store.snapshot()?.lanes ?? []));
}
