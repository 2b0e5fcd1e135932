import { useMemo } from 'react';
import type { LaneView } from '#shared/contracts/floor.ts';
import { type Bar, nextBars, nowBars } from './bars.ts';
import { useBoard, useBoardStore, useLanesDigest } from './board-context.ts';

/** What of the lanes the bars are made of: changes with people on lanes, not with deliveries. */
const digest = (lanes: readonly LaneView[]): string => JSON.stringify(lanes.map((l) => l.use && [l.use.kind, l.use.label, l.use.until, l.use.session, l.use.quiet]));

/** Bars of now and next over all lanes, and how many lanes there are. */
export function useBars(): { count: number; zone: string; now: Bar[]; next: Bar[] } {
  const store = useBoardStore();
  const sessions = useBoard('sessions');
  const runs = useBoard('runs');
  const zone = useBoard('centre')?.zone ?? 'UTC';
  const uses = useLanesDigest(digest);
  return useMemo(() => {
    const lanes = uses === '' ? [] : (store.snapshot()?.lanes ?? []);
    return { count: lanes.length, zone, now: nowBars(lanes, sessions ?? [], runs ?? [], zone), next: nextBars(lanes.length, sessions ?? [], zone) };
  }, [uses, sessions, runs, zone, store]);
}
