import type { RunDetail } from '../../contracts/runs.ts';
import { laneRanges, millilitres, number, plural } from './formats.ts';

export const runsText = {
  loading: 'Fetching the runs', failed: 'The runs can’t be shown.', retry: 'Try again', nothing: 'No lane is being dressed.', none: 'No run today', noneMore: 'Runs come from the lane machine by itself, or are planned and recorded here.',
  underWay: 'Under way', planned: 'Planned', ended: 'Today', machines: 'Lane machines', plan: 'Plan a run', record: 'Record a run that was made', takeBack: 'Take back', takeBackReason: 'Why',
  unverified: 'pattern unverified', noPattern: 'pattern not told', byHand: 'entered by hand', measured: 'measured', computed: 'computed', run: 'Run', lanes: 'Lanes', outcome: 'Outcome', volume: 'Conditioner',
  finished: 'Done', caution: 'Conditioner and cleaner: read the safety data sheet, wear gloves and eye protection, keep both off approaches: a trace of oil there can injure. Never walk an oiled lane. Follow the maker’s manual.',
  machine: 'Machine', pattern: 'Pattern', newest: 'Newest revision', anyPattern: 'Not known', lanesHint: 'In the order they are dressed: 25–32, or 19–24, 17', start: 'Start, wall time', startedAt: 'Began', finishedAt: 'Ended', allDressed: 'All dressed',
  skipped: 'Skipped', broken: 'Machine broke off on', save: 'Plan it', saveRecord: 'Record it', lanesWrong: 'Write lanes as 25–32 or 19–24, 17.', choose: 'Choose a machine', day: 'Night', levelsNone: 'no levels told', pace: (ms: number) => `${number(ms / 60_000, 1)} min a lane`,
} as const;

export const OUTCOMES = { 'dressed': 'dressed', 'skipped': 'skipped', 'broken-off': 'broke off: cleaned and redone' } as const;
export const STATUSES = { 'planned': 'planned', 'under-way': 'under way', 'finished': 'finished', 'aborted': 'broken off', 'cancelled': 'taken back' } as const;

/** What is going on, as a sentence. */
export function runsTitle(runs: readonly RunDetail[], machineName: (code: string) => string, time: (at: number) => string): string {
  const busy = runs.filter((r) => r.status === 'under-way');
  if (busy.length > 0) return busy.map((r) => `${machineName(r.machine)} ${r.laneNow === null ? `is on run ${r.run}` : `dresses lane ${r.laneNow}`}${r.endAt === null ? '' : `, done about ${time(r.endAt)}`}.`).join(' ');
  const next = runs.filter((r) => r.status === 'planned' && r.startAt !== null).sort((a, b) => (a.startAt ?? 0) - (b.startAt ?? 0))[0];
  return next?.startAt ? `${runsText.nothing} Run ${next.run} starts at ${time(next.startAt)}.` : runsText.nothing;
}

export const volumeText = (lane: RunDetail['outcomes'][number]): string =>
  lane.aUl === null ? '–' : `${millilitres(lane.aUl + (lane.bUl ?? 0), 1)}, ${lane.measured ? runsText.measured : runsText.computed}`;
export const doneText = (run: RunDetail): string => `${run.done} of ${plural(run.lanes.length, 'lane')} dressed`;
export const lanesText = (lanes: readonly number[]): string => (lanes.length === 0 ? 'lanes not told' : `lanes ${laneRanges(lanes)}`);

export const patternsText = {
  loading: 'Fetching the patterns', failed: 'The patterns can’t be shown.', none: 'No pattern yet', noneMore: 'A pattern says what a lane machine lays: length, passes, loads.', title: (count: number) => `${plural(count, 'pattern')} in this house.`,
  all: 'All patterns', add: 'New pattern', length: 'Length', volume: 'Conditioner a lane', revision: 'Revision', usedBy: 'Wanted by', nobody: 'nobody', name: 'Name', code: 'Code', codeHint: 'Small letters, digits and -',
  revise: 'New revision', save: 'Save', note: 'What changed', fromAbove: 'The film from above', fromAboveLabel: (length: number) => `The film from above: ${number(length, length % 1 === 0 ? 0 : 1)} ft from the foul line, darker where more lies.`,
  across: 'Across the boards', acrossLabel: (left: string, right: string) => `Film by board. Inside to outside: left ${left}, right ${right}.`, board: 'Board', ratio: 'Inside to outside', ratioNote: 'between the second arrows ÷ channel to board 10, each side apart; no certificate',
  exit: 'Exit board', exitNote: 'rule of 31, common practice, 35–48 ft', left: 'left', right: 'right', dry: 'dry outside', passes: 'Passes', way: 'Way', boards: 'Boards', loads: 'Loads', ul: 'µL', product: 'Product', feet: 'Feet', ml: 'mL', outbound: 'outbound', back: 'return',
  addPass: 'Add a pass', removePass: (n: number) => `Remove pass ${n}`, machines: 'Who can lay it', can: 'can lay it', revisions: 'Revisions', by: 'by', fromBoard: 'From board', toBoard: 'To board', fromFt: 'From ft', toFt: 'To ft', pass: (n: number) => `Pass ${n}`,
  total: 'Total', estimate: 'Computed from the passes, even along their feet; never measured.', lengthField: 'Length, ft', boardHint: 'as 2L or 2R',
} as const;
export const ratioText = (ratio: number | null): string => (ratio === null ? patternsText.dry : `${number(ratio, 1)} : 1`);
