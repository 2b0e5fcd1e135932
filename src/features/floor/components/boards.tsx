import { memo } from 'react';
import type { LaneView } from '#shared/contracts/floor.ts';
import { boardWords } from '#shared/text/en/floor.ts';
import { canvasMeasure, fitWord, useFontReady } from '../../../lib/fit-text.ts';
import { filmShare, rigShare } from '../lane-mark.ts';

/** Film drawn between a trace and nearly opaque: strength 0–1. */
export const filmOpacity = (strength: number): number => 0.13 + 0.72 * Math.min(1, Math.max(0, strength));
/** Where the count stands on a lane whose film length nobody told: at 41 ft, the middle of what is usual. */
const USUAL_SHARE = 41 / 60;
/** Lower boards than this show film only: the far layer of a large house on the wall. */
const NEAR_LAYER = 60;

interface Props {
  view: LaneView;
  now: number;
  width: number;
  height: number;
}

/** Sixty feet of boards: film by length and estimated strength, deliveries at its edge, arrows, a machine at work, bumpers. */
export function Boards({ view, now, width, height }: Props) {
  const share = filmShare(view);
  const rig = view.dressing ? rigShare(view.dressing, now) : null;
  return (
    <span className="boards">
      {rig === null ? <Film view={view} share={share} height={height} width={width} /> : <Rig share={rig} film={share ?? 1} height={height} width={width} />}
      {height < NEAR_LAYER ? null : <Darts height={Math.max(8, width * 0.3)} />}
      {view.bumpers ? <span className="rails" /> : null}
      {view.outOfService ? <span className="closed" /> : null}
      {view.brokenOff && height >= NEAR_LAYER ? <Redo width={width} /> : null}
    </span>
  );
}

/** The arrows, fifteen feet from the foul line. */
const Darts = memo(function Darts({ height }: { height: number }) {
  return (
    <svg aria-hidden className="darts" viewBox="0 0 70 20" style={{ height }} preserveAspectRatio="none">
      <path d="M3 14l2 6H1zM13 9l2 6h-4zM23 4.5l2 6h-4zM35 0l2.2 6.5h-4.4zM47 4.5l2 6h-4zM57 9l2 6h-4zM67 14l2 6h-4z" />
    </svg>
  );
});

function Film({ view, share, width, height }: { view: LaneView; share: number | null; width: number; height: number }) {
  if (!view.film) return null;
  const edge = Math.round((share ?? USUAL_SHARE) * height);
  const size = Math.min(22, Math.max(11, width * 0.4));
  const above = edge + 4;
  const bottom = above + size > height ? height - size - 2 : above;
  const shown = height >= NEAR_LAYER && !view.outOfService && !view.brokenOff && (view.hearsDeliveries || view.film.deliveries > 0);
  return (
    <>
      {share === null ? null : (
        <>
          <span className="film" style={{ height: edge, opacity: filmOpacity(view.film.strength) }} />
          {view.brokenOff ? null : <span className="film-edge" data-unverified={!view.film.verified} style={{ bottom: edge - 2 }} />}
        </>
      )}
      {shown ? <Balls count={view.film.deliveries} size={size} width={width} bottom={bottom} /> : null}
    </>
  );
}

function Balls({ count, size, width, bottom }: { count: number; size: number; width: number; bottom: number }) {
  useFontReady();
  const fitted = fitWord([String(count)], { width: width - 2, size, weight: 660 }, canvasMeasure);
  if (!fitted) return null;
  return (
    <span className="balls" style={{ bottom, fontSize: size, fontStretch: `${Math.min(84, fitted.stretch)}%` }}>
      {fitted.word}
    </span>
  );
}

function Rig({ share, film, width, height }: { share: number; film: number; width: number; height: number }) {
  const tall = Math.max(12, Math.min(26, width * 0.42));
  const up = Math.round(share * (height - tall));
  return (
    <>
      <span className="film" style={{ height: Math.min(up + tall / 2, film * height), opacity: filmOpacity(1) }} />
      <span className="rig" style={{ height: tall, transform: `translateY(${-up}px)` }}>
        <svg aria-hidden viewBox="0 0 12 8" width={tall * 0.62} height={tall * 0.42}>
          <path d="M1 7l5-5 5 5" />
        </svg>
      </span>
    </>
  );
}

function Redo({ width }: { width: number }) {
  useFontReady();
  const size = Math.min(16, Math.max(10.5, width * 0.36));
  const fitted = fitWord(boardWords.redo, { width: width - 4, size, weight: 720 }, canvasMeasure);
  return fitted ? (
    <span className="redo" style={{ fontSize: size, fontStretch: `${Math.min(75, fitted.stretch)}%` }}>
      {fitted.word}
    </span>
  ) : null;
}
