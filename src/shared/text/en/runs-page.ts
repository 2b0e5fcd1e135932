import type { RunDetail } from '../../contracts/runs.ts';
import { lanesText, listed, millilitres, number, plural } from './formats.ts';

export const runsText = {
  loading: 'Fetching the runs', failed: 'The runs can’t be shown.', retry: 'Try again', nothing: 'No lane is being dressed.', none: 'No run today', noneMore: 'Runs come from the lane machine by itself, or are planned and recorded here.',
  toDress: 'To dress', planThis: 'Plan this run', warmUp: 'warm-up', lanesNotTold: 'lanes not told', freeUnknown: (lanes: readonly number[]) => `Nobody knows when ${lanesText(lanes)} ${lanes.length === 1 ? 'is' : 'are'} free.`,
  underWay: 'Under way', planned: 'Planned', ended: 'Today', machines: 'Lane machines', plan: 'Plan a run', record: 'Record a run that was made', takeBack: 'Take back',
  unverified: 'pattern unverified', noPattern: 'pattern not told', byHand: 'entered by hand', measured: 'measured', computed: 'computed', run: 'Run', lanes: 'Lanes', outcome: 'Outcome', volume: 'Conditioner',
  finished: 'Done', caution: 'Conditioner and cleaner: read the safety data sheet, wear gloves and eye protection, keep both off approaches: a trace of oil there can injure. Never walk an oiled lane. Follow the maker’s manual.',
  machine: 'Machine', pattern: 'Pattern', choosePattern: 'Choose a pattern', anyPattern: 'Not known', lanesHint: 'In the order they are dressed: 25–32, or 19–24, 17', start: 'Start, wall time', startedAt: 'Began', finishedAt: 'Ended',
  skipped: 'Skipped', broken: 'Machine broke off on', save: 'Plan it', saveRecord: 'Record it', noneHint: 'Leave empty for none', choose: 'Choose a machine', levelsNone: 'no levels told', pace: (ms: number) => `${number(ms / 60_000, 1)} min a lane`,
} as const;

/** What is wrong with a field of the form, before anything is sent. */
export const runFaults = {
  'needed': 'This is needed.', 'lanes': 'Write lanes as 25–32 or 19–24, 17.', 'not-of-run': 'Not all of these are lanes of the run.', 'time': 'Write a time as 19:40.',
  'missing-hour': 'The clocks skip this hour tonight: take another time.',
} as const;

export const OUTCOMES = { 'dressed': 'dressed', 'skipped': 'skipped', 'broken-off': 'broke off: cleaned and redone' } as const;
export const STATUSES = { 'planned': 'planned', 'under-way': 'under way', 'finished': 'finished', 'aborted': 'broken off', 'cancelled': 'taken back' } as const;

/** Under the machine, done, or not: how a lane of a run stands. */
export const LANE_STATES = { 'dressed': 'dressed', 'now': 'being dressed', 'waits': 'not yet', 'skipped': 'skipped', 'broken-off': 'broke off' } as const;
export type LaneStateOfRun = keyof typeof LANE_STATES;
export const laneState = (run: Pick<RunDetail, 'outcomes' | 'laneNow'>, lane: number): LaneStateOfRun =>
  run.outcomes.findLast((one) => one.lane === lane)?.outcome ?? (run.laneNow === lane ? 'now' : 'waits');

/** `Night Owls, revision 3`; a run may lay what it doesn't name, or what isn't written down here. */
export function patternOfRun({ pattern, revision, verified = true }: { pattern: string | null; revision: number | null; verified?: boolean }, nameOf: (code: string) => string): string {
  if (pattern === null) return runsText.noPattern;
  return [nameOf(pattern), revision === null ? null : `revision ${revision}`, verified ? null : runsText.unverified].filter(Boolean).join(', ');
}

export const startByText = (clock: string, session: string | null): string => `Start by ${clock}${session === null ? '' : ` for ${session}`}.`;

const capital = (sentence: string): string => sentence.charAt(0).toUpperCase() + sentence.slice(1);

/** What is going on, as a sentence; `toDress`: lanes that a session wants and no run has. */
export function runsTitle(runs: readonly RunDetail[], toDress: readonly number[], machineName: (code: string) => string, time: (at: number) => string): string {
  const busy = runs.filter((r) => r.status === 'under-way');
  if (busy.length > 0) return busy.map((r) => `${machineName(r.machine)} ${r.laneNow === null ? `is on run ${r.run}` : `dresses lane ${r.laneNow}`}${r.endAt === null ? '' : `, done about ${time(r.endAt)}`}.`).join(' ');
  if (toDress.length > 0) return `${capital(lanesText(toDress))} ${toDress.length === 1 ? 'waits' : 'wait'} for a run.`;
  const next = runs.filter((r) => r.status === 'planned' && r.startAt !== null).sort((a, b) => (a.startAt ?? 0) - (b.startAt ?? 0))[0];
  return next?.startAt ? `${runsText.nothing} Run ${next.run} starts at ${time(next.startAt)}.` : runsText.nothing;
}

export const volumeText = (lane: RunDetail['outcomes'][number]): string =>
  lane.aUl === null ? '–' : `${millilitres(lane.aUl + (lane.bUl ?? 0), 1)}, ${lane.measured ? runsText.measured : runsText.computed}`;
export const doneText = (run: RunDetail): string => `${run.done} of ${plural(run.lanes.length, 'lane')} dressed`;

export const patternsText = {
  loading: 'Fetching the patterns', failed: 'The patterns can’t be shown.', none: 'No pattern yet', noneMore: 'A pattern says what a lane machine lays: length, passes, loads.', title: (count: number) => `${plural(count, 'pattern')} in this house.`,
  all: 'All patterns', add: 'New pattern', aLane: (ul: number) => `${millilitres(ul)} a lane`, revision: 'Revision', wantedBy: (names: readonly string[]) => (names.length === 0 ? 'no league wants it' : `for ${usersText(names)}`), name: 'Name', code: 'Code', codeHint: 'Small letters, digits and -',
  revise: 'New revision', save: 'Save', note: 'What changed', fromAbove: 'The film from above', fromAboveLabel: (length: number) => `The film from above: ${number(length, length % 1 === 0 ? 0 : 1)} ft from the foul line, darker where more lies.`,
  across: 'Across the boards', acrossLabel: (left: string, right: string) => `Film by board. Inside to outside: left ${left}, right ${right}.`, board: 'Board', ratio: 'Inside to outside', ratioNote: 'between the second arrows ÷ channel to board 10, each side apart; no certificate',
  exit: 'Exit board', exitNote: 'rule of 31, common practice, 35–48 ft', left: 'left', right: 'right', dry: 'dry outside', passes: 'Passes', way: 'Way', boards: 'Boards', loads: 'Loads', ul: 'µL', loadsUl: 'Loads × µL', buffOnly: 'none', conditioner: 'Conditioner', product: 'Product', feet: 'Feet', ml: 'mL', outbound: 'outbound', back: 'return',
  addPass: 'Add a pass', removePass: (n: number) => `Remove pass ${n}`, machines: 'Who can lay it', can: 'can lay it', revisions: 'Revisions', by: 'by', fromBoard: 'From board', toBoard: 'To board', fromFt: 'From ft', toFt: 'To ft', pass: (n: number) => `Pass ${n}`,
  total: 'Total', estimate: 'Computed from the passes, even along their feet; never measured.', lengthField: 'Length, ft', boardHint: 'as 2L or 2R',
} as const;
const USERS_NAMED = 3;
/** The first few by name, the rest by number. */
const usersText = (names: readonly string[]): string =>
  (names.length <= USERS_NAMED + 1 ? listed(names) : listed([...names.slice(0, USERS_NAMED), `${names.length - USERS_NAMED} more`]));
/** Each reason once, with the passes that it concerns: `Passes 1, 2 and 4: It carries no product B.` */
export function reasonsText(reasons: readonly { pass: number | undefined; says: string }[]): string {
  const sentences = [...new Set(reasons.map((reason) => reason.says))];
  return sentences.map((says) => {
    const passes = [...new Set(reasons.filter((reason) => reason.says === says).flatMap((reason) => reason.pass ?? []))];
    return passes.length === 0 ? says : `${passes.length === 1 ? 'Pass' : 'Passes'} ${listed(passes.map(String))}: ${says}`;
  }).join(' ');
}

/** `Nearest that it can lay: 18.50 mL instead of 19.65 mL, by board at most 35 µL more or 20 µL less.` */
export function insteadText({ totalUl, differenceUl, proven }: { totalUl: number; differenceUl: readonly number[]; proven: boolean }, asked: number): string {
  const [more, less] = [Math.max(0, ...differenceUl), Math.max(0, ...differenceUl.map((ul) => -ul))];
  const apart = [more > 0 ? `${number(more)} µL more` : null, less > 0 ? `${number(less)} µL less` : null].filter(Boolean).join(' or ');
  return `${proven ? 'Nearest' : 'Near'} that it can lay: ${millilitres(totalUl)} instead of ${millilitres(asked)}${apart === '' ? ', the same on every board' : `, by board at most ${apart}`}.`;
}

export const ratioText = (ratio: number | null): string => (ratio === null ? patternsText.dry : `${number(ratio, 1)} : 1`);
