import { useCentre } from '../../lib/centre.ts';
import { useKeys } from '../../lib/keyboard.ts';
import { useLane } from './board-context.ts';
import { useLaneAct } from './mutations.ts';
import type { LaneMode, Selection } from './use-lane-selection.ts';

interface Input {
  selection: Selection;
  mode: LaneMode;
  onMode: (mode: LaneMode) => void;
  lanes: number;
  onHelp: () => void;
  onSearch: () => void;
}

/** Keys of the floor: digits select, letters act on the selected lane, Escape goes back one step. */
export function useFloorKeys({ selection, mode, onMode, lanes, onHelp, onSearch }: Input): void {
  const { slug, may } = useCentre();
  const view = useLane(selection.lane ?? 0);
  const act = useLaneAct(slug);
  const step = (by: number): boolean => {
    const next = (selection.lane ?? 0) + by;
    if (selection.lane !== null && next >= 1 && next <= lanes) selection.select(next);
    return selection.lane !== null;
  };
  const leave = (): boolean => {
    const lane = selection.lane;
    if (lane === null) return false;
    if (mode !== 'none') onMode('none');
    else {
      selection.select(null);
      document.querySelector<HTMLElement>(`.strip[data-lane="${lane}"]`)?.focus({ preventScroll: true });
    }
    return true;
  };
  const onLane = (next: LaneMode, allowed: boolean): boolean => {
    if (view && allowed) onMode(next);
    return view !== null;
  };
  useKeys((key) => {
    if (selection.type(key)) return true;
    switch (key) {
      case 'Escape': return leave();
      case '?': onHelp(); return true;
      case '/': onSearch(); return true;
      case 'ArrowLeft': return step(-1);
      case 'ArrowRight': return step(1);
      case 'c': return onLane('call', may('call.raise'));
      case 'm': return onLane('move', may('lane.operate') && view?.use !== null);
      case 'o':
        if (view?.use && may('lane.operate')) act.mutate({ act: 'close', lane: view.lane, was: view.use });
        return view?.use ? true : onLane('open', may('lane.operate'));
      default: return false;
    }
  });
}
