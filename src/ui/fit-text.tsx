import { canvasMeasure, fitText, useFontReady } from '../lib/fit-text.ts';

/** Its short form, in the end its first letter alone. */
const shortened = (short: string | undefined, room: Parameters<typeof fitText>[2]) =>
  short ? (fitText(short, [], room, canvasMeasure) ?? fitText(short.charAt(0), [], room, canvasMeasure)) : null;

/** A title with second parts in a known width (px). Narrows, then drops second parts, then takes the short form, then shows nothing: never cut. */
export function FitText({ title, short, seconds = [], width, size = 12.5 }: { title: string; /** Said instead where not even the title fits: initials, a time. */ short?: string; seconds?: readonly string[]; width: number; size?: number }) {
  useFontReady();
  const room = { width, size, titleWeight: 690, secondWeight: 480, gap: 8 };
  const fitted = fitText(title, seconds, room, canvasMeasure) ?? shortened(short, room);
  if (!fitted) return null;
  return (
    <span className="whitespace-nowrap" style={{ fontSize: size, fontStretch: `${fitted.stretch}%` }}>
      <b className="font-[690]">{fitted.title}</b>
      {fitted.second ? <span className="ml-2 font-[480] opacity-90">{fitted.second}</span> : null}
    </span>
  );
}
