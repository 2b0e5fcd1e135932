import type { CallView, LaneView, RunBar, SessionBar } from '../../contracts/floor.ts';
import type { Equipment, LaneUseKind } from '../../domain/equipment.ts';
import { equipmentNames, safetyNames, statusNames, useNames } from './calls.ts';
import { feet, lanesText, listed, number, plural, spokenElapsed, timeOfDay } from './formats.ts';
import type { Sentences } from './sentences.ts';

type LaneCall = NonNullable<LaneView['call']>;

const TROUBLE: Partial<Record<Equipment, string>> = { 'pinsetter': 'pinsetter', 'ball-return': 'ball not returned', 'ball-lift': 'ball not returned' };
const troubleOf = (call: LaneCall): string => (call.safety ? `danger: ${safetyNames[call.safety].toLowerCase()}` : (TROUBLE[call.equipment] ?? equipmentNames[call.equipment]));

/** `league Thursday Scratch`, `open play`, `party`; warm-up keeps the league's name. */
function playsText({ kind, label }: { kind: LaneUseKind; label: string | null }): string {
  const name = useNames[kind].toLowerCase();
  return label ? `${name} ${label}` : name;
}

function callText(call: LaneCall, now: number): string {
  if (call.returned) return `runs again, ${troubleOf(call)}: cause missing`;
  if (call.status === 'parked') return `call parked, ${troubleOf(call)}`;
  const status = call.status === 'unanswered' ? 'call unanswered' : call.status === 'acknowledged' ? 'mechanic on the way' : 'mechanic on lane';
  return `${status} ${spokenElapsed(now - call.since)}, ${troubleOf(call)}`;
}

function machineText(view: LaneView, now: number): string | null {
  if (view.mechanicIn) return `mechanic in machine: ${view.mechanicIn.by}, ${spokenElapsed(now - view.mechanicIn.since)}`;
  if (view.machine === 'off') return 'pinsetter off';
  if (view.machine === 'stopped' && view.stoppedSince !== null) return `pinsetter stopped ${spokenElapsed(now - view.stoppedSince)}`;
  return view.machine === 'running' ? 'pinsetter on' : null;
}

function filmText(view: LaneView): string {
  if (view.brokenOff) return 'dressing broken off: clean and redo before play';
  if (view.dressing) return `being dressed, run ${view.dressing.run}`;
  const { film } = view;
  if (!film) return 'film unknown';
  const length = film.lengthFt === null ? 'film of unknown length' : `film ${feet(film.lengthFt)}`;
  const balls = view.hearsDeliveries || film.deliveries > 0 ? ` ${plural(film.deliveries, 'delivery', 'deliveries')}` : '';
  return `${length}${balls}${film.freshness === 'worn' ? ', worn' : ''}${film.verified ? '' : ', pattern unverified'}`;
}

/**
 * Everything that is drawn of a lane, as one sentence: its accessible name. `now` is server time, epoch ms.
 * `Lane 9, league Thursday Scratch, call unanswered 3 min 12 s, ball not returned, film 41 ft 96 deliveries`
 */
export function laneSentence(view: LaneView, now: number): string {
  const parts: (string | null)[] = [
    `Lane ${view.lane}`,
    view.use ? playsText(view.use) : 'free',
    view.use?.quiet ? 'nothing bowled for ten minutes' : null,
    view.progress ? `game ${view.progress.game} frame ${view.progress.frame}` : null,
    view.outOfService ? `out of service: ${view.outOfService.reason}` : null,
    view.call ? callText(view.call, now) : null,
    machineText(view, now),
    view.pins ? (view.pins.length === 0 ? 'no pin stands' : `${view.pins.length === 1 ? 'pin' : 'pins'} ${view.pins.join(' ')} ${view.pins.length === 1 ? 'stands' : 'stand'}`) : null,
    filmText(view),
    view.bumpers ? 'bumpers up' : null,
    view.unheard ? 'not heard: as last known' : null,
  ];
  return parts.filter((part) => part !== null).join(', ');
}

/** Words inside a machine where there is little room: the longest that fits is taken; \n breaks a line. */
export const capWords = {
  mechanicIn: ['mechanic in', 'mech.\nin'],
  out: ['out of service', 'out'],
  parked: ['parked'],
  off: ['off'],
  stopped: ['stopped', 'stop'],
  cause: ['cause?', 'why?'],
  unheard: ['unheard', '?'],
  redo: 'redo',
} as const;

/** On the boards of a lane on which the machine broke off. */
export const boardWords = { redo: ['clean and redo', 'redo'] } as const;

/** What stands in a bar: its name, and what is dropped first when there is no room. */
export interface BarText {
  title: string;
  /** Where not even the title fits. */
  short: string;
  second: string[];
}

/** `Thursday Scratch` → `TS`; one word keeps its first letter. */
const initials = (name: string): string => name.split(/\s+/).map((word) => word.charAt(0)).join('').toUpperCase().slice(0, 3);

export function sessionNowText(session: SessionBar, zone: string): BarText {
  const place = session.game === null ? null : `game ${session.game}${session.frame === null ? '' : ` · frame ${session.frame}`}`;
  const warm = session.phase === 'warm-up' ? `warm-up till ${timeOfDay(session.startAt, zone)}` : null;
  return { title: session.name, short: initials(session.name), second: [warm, place, `about ${timeOfDay(session.endAt, zone)}`].filter((p) => p !== null) };
}

/** `6 of 8`, while not every lane is ready and at least one is. */
function readyCount(session: SessionBar): string | null {
  const ready = session.lanes.filter((l) => l.state === 'ok').length;
  return ready === session.lanes.length || session.verdict === 'planned' ? null : `${ready} of ${session.lanes.length}`;
}

export const sessionNextText = (session: SessionBar, zone: string): BarText => ({
  title: `${session.name} ${timeOfDay(session.startAt, zone)}`,
  short: initials(session.name),
  second: [readyCount(session), session.says].filter((p) => p !== null),
});

/** People on one lane or on both of a pair: the times at which they are booked to end are said once when they are the same. */
export function useText(uses: readonly NonNullable<LaneView['use']>[], zone: string): BarText {
  const [use] = uses;
  if (!use) return { title: '', short: '', second: [] };
  const ends = [...new Set(uses.map((u) => u.until).filter((u) => u !== null))].sort((a, b) => a - b).map((at) => timeOfDay(at, zone));
  const title = use.label ?? (use.kind === 'open' ? 'Open' : use.kind === 'unknown' ? 'In use' : useNames[use.kind]);
  return { title, short: initials(title), second: [uses.some((u) => u.quiet) ? 'quiet' : null, ends.length === 0 ? null : listed(ends)].filter((p) => p !== null) };
}

export function runText(run: RunBar, zone: string): BarText {
  const end = run.endAt === null ? null : `${run.forecast ? 'done about' : 'done'} ${timeOfDay(run.endAt, zone)}`;
  return {
    title: `Run ${run.run}`,
    short: run.run,
    second: [`${run.done} of ${run.lanes.length} dressed`, run.laneNow === null ? null : `${run.laneNow} now`, end, run.verified ? null : 'pattern unverified'].filter((p) => p !== null),
  };
}

export const sessionSentence = (s: SessionBar, zone: string): string =>
  `${s.name}, lanes ${s.fromLane}–${s.toLane}, warm-up ${timeOfDay(s.warmUpAt, zone)}, start ${timeOfDay(s.startAt, zone)}, till about ${timeOfDay(s.endAt, zone)}${s.verdict ? `, ${verdictNames[s.verdict].toLowerCase()}` : ''}`;
export const runSentence = (r: RunBar, zone: string): string =>
  `Run ${r.run}, ${lanesText(r.lanes)}, ${runStatus[r.status]}${r.startAt === null ? '' : `, from ${timeOfDay(r.startAt, zone)}`}${r.endAt === null ? '' : ` till ${timeOfDay(r.endAt, zone)}`}`;

export const verdictNames = { 'planned': 'As planned', 'at-risk': 'At risk', 'held': 'Held', 'ready': 'Ready' } as const;
const runStatus = { 'planned': 'planned', 'under-way': 'under way', 'finished': 'finished', 'aborted': 'broken off', 'cancelled': 'cancelled' } as const;

/** Who has the call, under its clock. */
export function callWho(call: CallView, now: number): string {
  if (call.mechanicIn) return `${call.mechanicIn.by} in machine`;
  if (call.returnedAt !== null && call.status !== 'out-of-service') return 'runs, cause missing';
  if (call.status === 'unanswered' && call.escalation !== 'none') return { 'other-mechanic': 'unanswered: other mechanic', 'desk': 'unanswered: desk', 'manager': 'unanswered: manager' }[call.escalation];
  if (call.status === 'parked' && call.parkedUntil !== null && call.parkedUntil > now) return 'parked';
  return call.mechanic && call.status !== 'unanswered' ? `${call.mechanic.name}, ${statusNames[call.status]}` : statusNames[call.status];
}

export const pipsText = (session: SessionBar): string => {
  const count = (state: SessionBar['lanes'][number]['state']) => session.lanes.filter((l) => l.state === state).map((l) => l.lane);
  const said = [
    [count('ok'), 'ready'], [count('waits'), 'wait as planned'], [count('at-risk'), 'at risk'], [count('holds'), 'held'],
  ] as const;
  return said.filter(([lanes]) => lanes.length > 0).map(([lanes, word]) => `${lanesText(lanes)} ${word}`).join('; ');
};

export const levelsText = (m: { tankAMl: number | null; tankBMl: number | null; cleanerMl: number | null; wasteMl: number | null; batteryPct: number | null }): string =>
  [
    m.tankAMl === null ? null : `A ${number(m.tankAMl)} mL`, m.tankBMl === null ? null : `B ${number(m.tankBMl)} mL`, m.cleanerMl === null ? null : `cleaner ${number(m.cleanerMl)} mL`,
    m.wasteMl === null ? null : `waste ${number(m.wasteMl)} mL`, m.batteryPct === null ? null : `battery ${number(m.batteryPct)}%`,
  ].filter((p) => p !== null).join(' · ');

export const refusals: Sentences = {
  'lane.unknown': ({ lane, lanes }) => (lanes === undefined ? `There is no lane ${String(lane ?? 'of that number')} here.` : `There is no lane ${String(lane)}: the house has ${String(lanes)}.`),
  'lane.already-open': ({ lane }) => `Lane ${String(lane ?? '')} is open already.`,
  'lane.out-of-service': ({ lane }) => `Lane ${String(lane ?? '')} is out of service. Put it back in service first.`,
  'lane.not-open': ({ lane }) => `Nobody is on lane ${String(lane ?? '')}.`,
  'lane.same': () => 'They are on this lane already. Choose another one.',
  'lane.in-service': ({ lane }) => `Lane ${String(lane ?? '')} is in service.`,
  'lane.held-by-call': ({ lane }) => `A call holds lane ${String(lane ?? '')} out of service. Put it back in service at the call.`,
  'counts.empty': () => 'Enter games or frames.',
};
