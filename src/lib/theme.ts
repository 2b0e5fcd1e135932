import { useSyncExternalStore } from 'react';

/** The same key as public/theme.js, which applies it before the first paint. */
const STORED = 'lanewright.theme';
const CHANGED = 'lanewright:theme';
export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

function read(): Theme {
  try {
    const stored = localStorage.getItem(STORED);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  } catch {
    return 'system';
  }
}

export function chooseTheme(theme: Theme): void {
  try {
    localStorage.setItem(STORED, theme);
  } catch {
    // Without storage the system's theme stays.
  }
  window.dispatchEvent(new Event(CHANGED));
}

export function useTheme(): Theme {
  return useSyncExternalStore((listener) => {
    window.addEventListener(CHANGED, listener);
    return () => window.removeEventListener(CHANGED, listener);
  }, read);
}
