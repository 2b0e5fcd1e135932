import { canvasMeasure, fitText, useFontReady } from '../lib/fit-text.ts';

/** A title with second parts in a known width (px). Narrows, then drops second parts, then shows nothing: never cut. */
export function FitText({ title, seconds = [], width, size = 12.5 }: { title: string; seconds?: readonly string[]; width: number; size?: number }) {
  useFontReady();
  const fitted = fitText(title, seconds, { width, size, titleWeight: 690, secondWeight: 480, gap: 8 }, canvasMeasure);
  if (!fitted) return null;
  return (
    <span className="whitespace-nowrap" style={{ fontSize: size, fontStretch: `${fitted.stretch}%` }}>
      <b className="font-[690]">{fitted.title}</b>
      {fitted.second ? <span className="ml-2 font-[480] opacity-85">{fitted.second}</span> : null}
    </span>
  );
}
