import { useSyncExternalStore } from 'react';

/** Widths of the font that are tried, in percent, with canvas's own words for them. Wide first: a text is narrowed before it is shortened. */
const STRETCHES = [[100, 'normal'], [87.5, 'semi-condensed'], [75, 'condensed'], [62.5, 'extra-condensed']] as const;
export type Stretch = (typeof STRETCHES)[number][0];

/** Advance width in px of a text in the app's font. */
export type Measure = (text: string, font: { size: number; weight: number; stretch: Stretch }) => number;

export interface Fitted {
  title: string;
  /** Kept second part; empty when it was dropped. */
  second: string;
  stretch: Stretch;
}

interface Room {
  width: number;
  size: number;
  titleWeight: number;
  secondWeight: number;
  /** Between title and second part, px. */
  gap: number;
}

/**
 * Fits a title with its second parts into a width, without ever cutting: first by the font's width, then by dropping second
 * parts from the end, then all of it (null: it is shown on selection). Pure: `measure` is passed in.
 */
export function fitText(title: string, seconds: readonly string[], room: Room, measure: Measure): Fitted | null {
  for (let kept = seconds.length; kept >= 0; kept--) {
    const second = seconds.slice(0, kept).join(' · ');
    for (const [stretch] of STRETCHES) {
      const wide = measure(title, { size: room.size, weight: room.titleWeight, stretch });
      const more = second === '' ? 0 : room.gap + measure(second, { size: room.size, weight: room.secondWeight, stretch });
      if (wide + more <= room.width) return { title, second, stretch };
    }
  }
  return null;
}

/** The first of several wordings that fits, longest first, at the widest font that does; `\n` in one breaks a line. */
export function fitWord(words: readonly string[], room: { width: number; size: number; weight: number }, measure: Measure): { word: string; stretch: Stretch } | null {
  for (const word of words) {
    for (const [stretch] of STRETCHES) {
      const widest = Math.max(...word.split('\n').map((line) => measure(line, { size: room.size, weight: room.weight, stretch })));
      if (widest <= room.width) return { word, stretch };
    }
  }
  return null;
}

const FAMILY = '"Archivo Variable"';
let context: CanvasRenderingContext2D | null = null;
const known = new Map<string, number>();

/** Measures with a canvas. A browser without `fontStretch` there measures at full width: too wide, so that nothing is cut. */
export const canvasMeasure: Measure = (text, { size, weight, stretch }) => {
  const key = `${weight}|${stretch}|${size}|${text}`;
  const before = known.get(key);
  if (before !== undefined) return before;
  context ??= document.createElement('canvas').getContext('2d');
  if (!context) return text.length * size;
  context.font = `${weight} ${size}px ${FAMILY}, system-ui, sans-serif`;
  if ('fontStretch' in context) context.fontStretch = STRETCHES.find(([percent]) => percent === stretch)?.[1] ?? 'normal';
  const width = Math.ceil(context.measureText(text).width * 1.01);
  known.set(key, width);
  return width;
};

let ready = false;
const listeners = new Set<() => void>();
let asked = false;
function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  if (!asked) {
    asked = true;
    void document.fonts.load(`700 12px ${FAMILY}`).then(() => {
      ready = true;
      known.clear();
      for (const told of listeners) told();
    });
  }
  return () => listeners.delete(listener);
}

/** True once the app's font is there; what was measured before is measured again. */
export const useFontReady = (): boolean => useSyncExternalStore(subscribe, () => ready);
