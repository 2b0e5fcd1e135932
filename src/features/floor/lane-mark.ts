import type { LaneView } from '#shared/contracts/floor.ts';

/** What is drawn on a lane's machine. One at a time, what asks most for a person first. */
export type LaneMark =
  | 'danger' | 'unanswered' | 'mechanic-in' | 'answered' | 'parked' | 'out-of-service' | 'stopped' | 'cause-missing' | 'unheard' | 'off' | 'running' | 'unknown';

/** The mark of a lane, and since when its clock runs (epoch ms; null: no clock). */
export function markOf(view: LaneView): { mark: LaneMark; since: number | null } {
  const { call } = view;
  const open = call && !call.returned && call.status !== 'closed' ? call : null;
  if (view.mechanicIn) return { mark: 'mechanic-in', since: view.mechanicIn.since };
  if (open?.safety && open.status === 'unanswered') return { mark: 'danger', since: open.since };
  if (open?.status === 'unanswered') return { mark: 'unanswered', since: open.since };
  if (open?.status === 'acknowledged' || open?.status === 'on-lane') return { mark: 'answered', since: open.since };
  if (view.outOfService || open?.status === 'out-of-service') return { mark: 'out-of-service', since: null };
  if (open?.status === 'parked') return { mark: 'parked', since: null };
  if (view.machine === 'stopped') return { mark: 'stopped', since: view.stoppedSince };
  if (call?.returned) return { mark: 'cause-missing', since: null };
  if (view.unheard) return { mark: 'unheard', since: null };
  return { mark: view.machine === 'off' ? 'off' : view.machine === 'unknown' ? 'unknown' : 'running', since: null };
}

/** A clock within a machine's width: 3:12, 47 m, then whole hours. */
export function capClock(ms: number): string {
  const minutes = Math.max(0, Math.floor(ms / 60_000));
  if (minutes < 10) return `${minutes}:${String(Math.max(0, Math.floor(ms / 1000)) % 60).padStart(2, '0')}`;
  return minutes < 60 ? `${minutes} m` : `${Math.floor(minutes / 60)} h`;
}

/** What counts as a change that flashes a lane's figure once: its people, machine, calls and dressing, not each delivery. */
export const changeSignature = (view: LaneView): string =>
  [view.use?.kind ?? '', view.use?.label ?? '', view.machine, view.call ? `${view.call.id}${view.call.status}${view.call.returned}` : '', view.film?.at ?? '', view.brokenOff, view.dressing?.run ?? '', view.outOfService?.since ?? ''].join('|');

const SIXTY_FEET = 60;
/** Share of the lane that the film covers, 0–1; null when its length isn't known. */
export const filmShare = (view: LaneView): number | null => {
  const length = view.film?.lengthFt ?? null;
  return length === null ? null : Math.min(1, Math.max(0, length / SIXTY_FEET));
};

/**
 * How far up a lane the machine is, 0–1, from its own pace (an estimate). It never says it is through: at most 0.97 until
 * the machine itself says so.
 */
export const rigShare = (dressing: NonNullable<LaneView['dressing']>, now: number): number =>
  Math.min(0.97, Math.max(0, (now - dressing.since) / Math.max(1, dressing.paceMs)));
