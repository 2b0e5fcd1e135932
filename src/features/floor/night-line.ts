import type { RunBar, SessionBar } from '#shared/contracts/floor.ts';
import { laneRanges } from '#shared/text/en/formats.ts';

/** The night on one clock: pure arithmetic, in px within `width`. */
export interface NightItem {
  key: string;
  kind: 'session' | 'run';
  look: 'league' | 'open' | 'past' | 'plan' | 'risk' | 'held' | 'ready' | 'run' | 'run-planned';
  row: number;
  x: number;
  width: number;
  /** Warm-up before `x` of the play itself, px. */
  warmUp: number;
  /** Where the label stands; null: no room in any row beside others, it is in the list for readers and on pointing. */
  label: { text: string; x: number; width: number; inside: boolean } | null;
  session: SessionBar | null;
  run: RunBar | null;
}

export interface Night {
  from: number;
  to: number;
  rows: number;
  items: NightItem[];
}

const HOUR = 3_600_000;
const QUARTER = HOUR / 4;
const BEFORE = 3 * HOUR;
const AFTER = 6 * HOUR;
const LABEL_PAD = 7;
const LABEL_GAP = 4;

type LabelWidth = (text: string) => number;
interface Piece {
  key: string;
  kind: NightItem['kind'];
  look: NightItem['look'];
  from: number;
  to: number;
  warmUpAt: number;
  text: string;
  session: SessionBar | null;
  run: RunBar | null;
}

function lookOf(session: SessionBar): NightItem['look'] {
  if (session.phase === 'past') return 'past';
  if (session.phase === 'now' || session.phase === 'warm-up') return session.kind === 'league' || session.kind === 'tournament' ? 'league' : 'open';
  return session.verdict === 'at-risk' ? 'risk' : session.verdict === 'held' ? 'held' : session.verdict === 'ready' ? 'ready' : 'plan';
}

const ofSession = (s: SessionBar): Piece => ({
  key: s.id, kind: 'session', look: lookOf(s), from: s.startAt, to: s.endAt, warmUpAt: Math.min(s.warmUpAt, s.startAt), text: `${s.name} ${s.fromLane}–${s.toLane}`, session: s, run: null,
});
const ofRun = (r: RunBar): Piece[] =>
  r.startAt === null || r.status === 'cancelled'
    ? []
    : [{ key: r.key, kind: 'run', look: r.status === 'planned' ? 'run-planned' : 'run', from: r.startAt, to: r.endAt ?? r.startAt + QUARTER, warmUpAt: r.startAt, text: `${r.run} · ${laneRanges(r.lanes)}`, session: null, run: r }];

/**
 * Lays sessions and runs on a clock from three hours before `now` to six after, by whole hours. Each goes into the first row in
 * which neither bar nor label touches another; a label stands in its bar when it fits, else beside it.
 */
export function layoutNight(sessions: readonly SessionBar[], runs: readonly RunBar[], now: number, width: number, labelWidth: LabelWidth): Night {
  const from = Math.floor((now - BEFORE) / HOUR) * HOUR;
  const to = from + BEFORE + AFTER;
  const xOf = (at: number) => Math.round(((Math.min(to, Math.max(from, at)) - from) / (to - from)) * width);
  const pieces = [...sessions.map(ofSession), ...runs.flatMap(ofRun)].filter((p) => p.to > from && p.warmUpAt < to).sort((a, b) => a.warmUpAt - b.warmUpAt || a.to - b.to);
  const taken: { from: number; to: number }[][] = [];
  const items = pieces.map((piece) => {
    const start = xOf(piece.warmUpAt);
    const end = Math.max(start + 4, xOf(piece.to));
    const play = Math.min(end - 2, Math.max(start, xOf(piece.from)));
    const wide = labelWidth(piece.text) + 2 * LABEL_PAD;
    const spot = labelSpot(play, start, end, wide, width);
    const extent = { from: Math.min(start, spot?.x ?? start), to: Math.max(end, spot ? spot.x + spot.width : end) + LABEL_GAP };
    const row = rowFor(taken, extent);
    return { key: piece.key, kind: piece.kind, look: piece.look, row, x: play, width: end - play, warmUp: play - start, label: spot && { ...spot, text: piece.text }, session: piece.session, run: piece.run };
  });
  return { from, to, rows: taken.length, items };
}

/** In the bar, else to its right, else to its left: wherever the whole label stays within the line. */
function labelSpot(play: number, start: number, end: number, wide: number, width: number): { x: number; width: number; inside: boolean } | null {
  if (wide <= end - play) return { x: play, width: wide, inside: true };
  if (end + wide <= width) return { x: end, width: wide, inside: false };
  return start - wide >= 0 ? { x: start - wide, width: wide, inside: false } : null;
}

function rowFor(taken: { from: number; to: number }[][], extent: { from: number; to: number }): number {
  const row = taken.findIndex((placed) => placed.every((p) => p.to <= extent.from || p.from >= extent.to));
  const index = row === -1 ? taken.length : row;
  (taken[index] ??= []).push(extent);
  return index;
}

/** Full local hours between two instants; `minuteOf` gives the local minute of an instant (zones with half hours, clock changes). */
export function hourTicks(from: number, to: number, width: number, minuteOf: (at: number) => number): { at: number; x: number }[] {
  const ticks: { at: number; x: number }[] = [];
  for (let at = Math.ceil(from / QUARTER) * QUARTER; at < to; at += QUARTER) if (minuteOf(at) === 0) ticks.push({ at, x: Math.round(((at - from) / (to - from)) * width) });
  return ticks;
}
