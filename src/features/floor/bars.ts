import type { LaneView, RunBar, SessionBar } from '#shared/contracts/floor.ts';
import { type BarText, runText, sessionNextText, sessionNowText, useText } from '#shared/text/en/floor.ts';

/** A bar over adjacent lanes: what holds them now, or what comes next. */
export interface Bar {
  key: string;
  from: number;
  to: number;
  look: 'league' | 'open' | 'run' | 'plan' | 'risk' | 'held' | 'ready';
  text: BarText;
  session: string | null;
}

/** What one lane has: two lanes belong to one bar when their keys are equal and they are adjacent. */
interface Piece {
  key: string;
  look: Bar['look'];
  text: BarText;
  session: string | null;
}

const lanesOf = (session: SessionBar): readonly number[] =>
  session.lanes.length > 0 ? session.lanes.map((l) => l.lane) : Array.from({ length: session.toLane - session.fromLane + 1 }, (_, i) => session.fromLane + i);

/** Joins adjacent lanes of equal key; no lane is in two bars, so bars of one row never overlap. */
function join(lanes: number, pieceOf: (lane: number) => Piece | null): Bar[] {
  const bars: Bar[] = [];
  for (let lane = 1; lane <= lanes; lane++) {
    const piece = pieceOf(lane);
    if (!piece) continue;
    const last = bars.at(-1);
    if (last && last.to === lane - 1 && last.key.startsWith(`${piece.key}@`)) last.to = lane;
    else bars.push({ key: `${piece.key}@${lane}`, from: lane, to: lane, look: piece.look, text: piece.text, session: piece.session });
  }
  return bars;
}

/** What holds each lane now: its people, else the run under way that still has it before it. */
export function nowBars(lanes: readonly LaneView[], sessions: readonly SessionBar[], runs: readonly RunBar[], zone: string): Bar[] {
  const playing = sessions.filter((s) => s.phase === 'now' || s.phase === 'warm-up');
  const underWay = runs.filter((r) => r.status === 'under-way');
  return join(lanes.length, (lane) => {
    const view = lanes[lane - 1];
    if (!view) return null;
    const session = view.use?.session ? sessions.find((s) => s.id === view.use?.session) : view.use ? undefined : playing.find((s) => lanesOf(s).includes(lane));
    if (session) return { key: `session:${session.id}`, look: lookOfPlay(session.kind), text: sessionNowText(session, zone), session: session.id };
    if (view.use) return pieceOfUse(view, view.use, lanes, zone);
    const run = underWay.find((r) => r.lanes.includes(lane));
    return run ? { key: `run:${run.key}`, look: 'run', text: runText(run, zone), session: null } : null;
  });
}

/** A named party may span many lanes; people without a name share a bar with the other lane of their pair. */
function pieceOfUse(view: LaneView, use: NonNullable<LaneView['use']>, lanes: readonly LaneView[], zone: string): Piece {
  const alike = (other: LaneView | undefined) => other?.use?.kind === use.kind && other.use.label === use.label;
  const pair = Math.ceil(view.lane / 2);
  const together = [lanes[2 * pair - 2], lanes[2 * pair - 1]].filter(alike).flatMap((l) => l?.use ?? []);
  const key = use.label === null ? `use:${use.kind}:pair ${pair}` : `use:${use.kind}:${use.label}:${use.until ?? ''}`;
  return { key, look: use.kind === 'league' || use.kind === 'tournament' ? 'league' : 'open', text: useText(use.label === null ? together : [use], zone), session: null };
}

const lookOfPlay = (kind: SessionBar['kind']): Bar['look'] => (kind === 'league' || kind === 'tournament' ? 'league' : 'open');
const NEXT_LOOK = { 'planned': 'plan', 'at-risk': 'risk', 'held': 'held', 'ready': 'ready' } as const;

const byStart = (sessions: readonly SessionBar[]): SessionBar[] => sessions.filter((s) => s.phase === 'next' || s.phase === 'later').sort((a, b) => a.startAt - b.startAt);

/** The earliest session of a lane that is still to come. */
export const nextSession = (lane: number, sessions: readonly SessionBar[]): SessionBar | null => byStart(sessions).find((s) => lanesOf(s).includes(lane)) ?? null;

/** What each lane has next. */
export function nextBars(lanes: number, sessions: readonly SessionBar[], zone: string): Bar[] {
  const coming = byStart(sessions);
  const held = new Map(coming.map((s) => [s.id, new Set(lanesOf(s))]));
  return join(lanes, (lane) => {
    const session = coming.find((s) => held.get(s.id)?.has(lane));
    if (!session) return null;
    return { key: `next:${session.id}`, look: session.verdict ? NEXT_LOOK[session.verdict] : 'plan', text: sessionNextText(session, zone), session: session.id };
  });
}

/** Lanes grouped by what plays on them, for the floor that is turned a quarter: every lane once, in order within its group. */
export interface LaneGroup {
  key: string;
  look: Bar['look'] | 'free';
  text: BarText | null;
  next: BarText | null;
  nextLook: Bar['look'] | null;
  lanes: number[];
}

export function groupLanes(count: number, now: readonly Bar[], next: readonly Bar[]): LaneGroup[] {
  const groups: LaneGroup[] = [];
  const at = (bars: readonly Bar[], lane: number) => bars.find((b) => b.from <= lane && lane <= b.to) ?? null;
  for (let lane = 1; lane <= count; lane++) {
    const bar = at(now, lane);
    const after = at(next, lane);
    const kind = bar?.look === 'open' && !bar.session ? 'open' : (bar?.key.replace(/@\d+$/, '') ?? 'free');
    const key = `${kind}|${after?.key.replace(/@\d+$/, '') ?? ''}`;
    const last = groups.at(-1);
    if (last && last.key === key) last.lanes.push(lane);
    else groups.push({ key, look: bar?.look ?? 'free', text: bar?.text ?? null, next: after?.text ?? null, nextLook: after?.look ?? null, lanes: [lane] });
  }
  return groups;
}
