/** Sound of a new call: made by the browser, so that nothing need be loaded when it matters. */

const STORED = 'lanewright.sound';
let context: AudioContext | null = null;
const listeners = new Set<() => void>();

export const soundPossible = (): boolean => 'AudioContext' in window;

function wished(): boolean {
  try {
    return localStorage.getItem(STORED) === 'on';
  } catch {
    return false;
  }
}

/** Browsers let a page sound only after somebody pressed something on it: wished for, it starts at the next press. */
export function wakeSound(): void {
  if (!wished() || !soundPossible()) return;
  context ??= new AudioContext();
  void context.resume().then(told, told);
}

export function setSound(on: boolean): void {
  try {
    localStorage.setItem(STORED, on ? 'on' : 'off');
  } catch {
    // Without storage it lasts as long as the page.
  }
  if (on) {
    wakeSound();
    ring('new');
  } else void context?.close();
  if (!on) context = null;
  told();
}

const told = (): void => {
  for (const listener of listeners) listener();
};
export const onSound = (listener: () => void): (() => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};
export const soundOn = (): boolean => context !== null && context.state === 'running';

/** Tones as [Hz, start s, length s]. Low enough to carry through a loud back end, each kind with its own rhythm. */
const TONES = {
  new: [[660, 0, 0.16], [880, 0.18, 0.28]],
  still: [[660, 0, 0.14], [660, 0.2, 0.14], [880, 0.4, 0.3]],
  alarm: [[520, 0, 0.3], [980, 0.32, 0.3], [520, 0.64, 0.3], [980, 0.96, 0.5]],
} as const;

export function ring(kind: keyof typeof TONES): void {
  if (!context) return;
  const from = context.currentTime + 0.02;
  for (const [pitch, at, length] of TONES[kind]) {
    const tone = context.createOscillator();
    const volume = context.createGain();
    tone.type = 'square';
    tone.frequency.value = pitch;
    volume.gain.setValueAtTime(0.0001, from + at);
    volume.gain.exponentialRampToValueAtTime(0.35, from + at + 0.02);
    volume.gain.exponentialRampToValueAtTime(0.0001, from + at + length);
    tone.connect(volume).connect(context.destination);
    tone.start(from + at);
    tone.stop(from + at + length);
  }
}
