import { useCallback, useEffect, useRef, useState } from 'react';
import { settle, typeDigit, TYPING_PAUSE_MS } from './lane-typing.ts';

export interface Selection {
  lane: number | null;
  /** Digits typed so far, shown while a longer number is possible. */
  typed: string;
  select: (lane: number | null) => void;
  /** Takes a digit key; false when it wasn't one. */
  type: (key: string) => boolean;
}

/** The selected lane of the floor, by pointer, by arrow or by typing its number. */
export function useLaneSelection(lanes: number): Selection {
  const [lane, setLane] = useState<number | null>(null);
  const [typed, setTyped] = useState('');
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  useEffect(() => () => void (timer.current && clearTimeout(timer.current)), []);
  const select = useCallback((next: number | null) => {
    if (timer.current) clearTimeout(timer.current);
    setTyped('');
    setLane((before) => (before === next ? null : next));
  }, []);
  const type = (key: string): boolean => {
    if (!/^\d$/.test(key)) return false;
    if (timer.current) clearTimeout(timer.current);
    const { digits, select: at } = typeDigit(typed, key, lanes);
    setTyped(at === null ? digits : '');
    if (at !== null) setLane(at);
    else
      timer.current = setTimeout(() => {
        const meant = settle(digits, lanes);
        if (meant !== null) setLane(meant);
        setTyped('');
      }, TYPING_PAUSE_MS);
    return true;
  };
  return { lane, typed, select, type };
}

/** What is being done with the selected lane: the form that stands open. */
export type LaneMode = 'none' | 'open' | 'move' | 'call' | 'out';

/** Kept by the page, as keys work anywhere on the floor; another lane begins with none. */
export function useLaneMode(lane: number | null): [LaneMode, (mode: LaneMode) => void] {
  const [state, setState] = useState<{ lane: number | null; mode: LaneMode }>({ lane, mode: 'none' });
  return [state.lane === lane ? state.mode : 'none', (mode) => setState({ lane, mode })];
}
