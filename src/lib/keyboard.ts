import { useEffect, useRef, useSyncExternalStore } from 'react';

const STORED = 'lanewright.keys';
const listeners = new Set<() => void>();

function read(): boolean {
  try {
    return localStorage.getItem(STORED) !== 'off';
  } catch {
    return true;
  }
}

/** One-letter keys can be switched off (WCAG 2.2, 2.1.4): a voice or a dropped object must not work the floor. */
export function setLetterKeys(on: boolean): void {
  try {
    localStorage.setItem(STORED, on ? 'on' : 'off');
  } catch {
    // A private window without storage keeps the keys on.
  }
  for (const listener of listeners) listener();
}

export function useLetterKeys(): boolean {
  return useSyncExternalStore((listener) => {
    listeners.add(listener);
    return () => listeners.delete(listener);
  }, read);
}

/** Somebody is typing text, or a dialog has the keyboard. */
function isTaken(event: KeyboardEvent): boolean {
  if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return true;
  const target = event.target as HTMLElement;
  return target.matches?.('input, textarea, select, [contenteditable=true]') || document.querySelector('[role=dialog][data-state=open]') !== null;
}

/** Keys of a page. `handle` says whether it used the key; Escape always arrives, the rest only while letter keys are on. */
export function useKeys(handle: (key: string) => boolean): void {
  const on = useLetterKeys();
  const latest = useRef(handle);
  useEffect(() => {
    latest.current = handle;
  });
  useEffect(() => {
    const listen = (event: KeyboardEvent) => {
      if (isTaken(event) || (!on && event.key !== 'Escape')) return;
      if (latest.current(event.key)) event.preventDefault();
    };
    window.addEventListener('keydown', listen);
    return () => window.removeEventListener('keydown', listen);
  }, [on]);
}
