import type { BodyOf } from '#shared/contracts/contract.ts';
import type { runContracts } from '#shared/contracts/runs.ts';
import { type BusinessDay, instantOfNight } from '#shared/domain/business-day.ts';
import { parseLanes } from '../../lib/lane-list.ts';
import { minutesOf } from '../../lib/wall-clock.ts';

/** What is typed into the form of a run; times on the wall of this night. */
export interface RunDraft {
  machine: string;
  pattern: string;
  lanes: string;
  start: string;
  end: string;
  skipped: string;
  broken: string;
}
export const EMPTY_RUN: RunDraft = { machine: '', pattern: '', lanes: '', start: '', end: '', skipped: '', broken: '' };

/** What is wrong with a field, by its code. */
export type DraftFaults = Partial<Record<keyof RunDraft, 'needed' | 'lanes' | 'not-of-run' | 'time' | 'missing-hour'>>;
type Read<T> = { ok: true; body: T } | { ok: false; faults: DraftFaults };

type Instant = { at: number } | { fault: 'needed' | 'time' | 'missing-hour' };

function instantOf(clock: string, night: { day: BusinessDay; zone: string }): Instant {
  const minutes = minutesOf(clock);
  if (minutes === null) return { fault: clock.trim() === '' ? 'needed' : 'time' };
  const wall = instantOfNight(night.day, minutes, night.zone);
  return wall.ok ? { at: wall.instant } : { fault: wall.code === 'time.missing-hour' ? 'missing-hour' : 'time' };
}

function faultsOf(draft: RunDraft, times: Partial<Record<'start' | 'end', Instant>>, lanes: readonly number[] | null): DraftFaults {
  const faults: DraftFaults = {};
  if (draft.machine === '') faults.machine = 'needed';
  if (lanes === null) faults.lanes = draft.lanes.trim() === '' ? 'needed' : 'lanes';
  for (const [field, read] of Object.entries(times) as ['start' | 'end', Instant][]) if ('fault' in read) faults[field] = read.fault;
  return faults;
}

/** A planned run of the draft, or what is wrong with its fields. */
export function planOf(draft: RunDraft, night: { day: BusinessDay; zone: string }): Read<BodyOf<typeof runContracts.plan>> {
  const lanes = parseLanes(draft.lanes);
  const start = instantOf(draft.start, night);
  const faults = faultsOf(draft, { start }, lanes);
  if (draft.pattern === '') faults.pattern = 'needed';
  if (Object.keys(faults).length > 0 || lanes === null || 'fault' in start) return { ok: false, faults };
  return { ok: true, body: { machine: draft.machine, pattern: draft.pattern, lanes, startAt: start.at } };
}

/** A run that was made; lanes that were skipped, or on which the machine broke off, are some of its lanes. */
export function recordOf(draft: RunDraft, night: { day: BusinessDay; zone: string }): Read<BodyOf<typeof runContracts.record>> {
  const lanes = parseLanes(draft.lanes);
  const [start, end] = [instantOf(draft.start, night), instantOf(draft.end, night)];
  const faults = faultsOf(draft, { start, end }, lanes);
  const some = (field: 'skipped' | 'broken'): number[] => {
    if (draft[field].trim() === '') return [];
    const listed = parseLanes(draft[field]);
    if (listed === null) faults[field] = 'lanes';
    else if (lanes && listed.some((lane) => !lanes.includes(lane))) faults[field] = 'not-of-run';
    return listed ?? [];
  };
  const [skipped, broken] = [some('skipped'), some('broken')];
  if (Object.keys(faults).length > 0 || lanes === null || 'fault' in start || 'fault' in end) return { ok: false, faults };
  const outcome = (lane: number) => (broken.includes(lane) ? ('broken-off' as const) : skipped.includes(lane) ? ('skipped' as const) : ('dressed' as const));
  return {
    ok: true,
    body: { machine: draft.machine, ...(draft.pattern === '' ? {} : { pattern: draft.pattern }), startedAt: start.at, finishedAt: end.at, lanes: lanes.map((lane) => ({ lane, outcome: outcome(lane) })) },
  };
}
