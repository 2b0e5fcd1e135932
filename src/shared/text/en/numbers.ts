import type { NightView, PastFigure } from '../../contracts/numbers.ts';
import type { CountKind } from '../../domain/equipment.ts';
import type { NightFigures, Rate } from '../../domain/numbers/night/figures.ts';
import { dayOfDate, duration, longDate, millilitres, number, percent, plural } from './formats.ts';
import type { Sentences } from './sentences.ts';

export const refusals: Sentences = {
  'night.date-invalid': () => 'That is no date. Write it as 2026-05-14.',
  'night.not-begun': ({ date }) => `The night of ${date} hasn’t begun.`,
};

export const rateText = (rate: Rate | null): string => (rate ? number(rate.perThousand, 2) : '–');
export const intervalText = (rate: Rate | null): string => (rate ? `${number(rate.low, 2)}–${number(rate.high, 2)}` : '');
export const shareText = (share: number | null): string => (share === null ? '–' : percent(share * 100));
export const timeText = (ms: number | null): string => (ms === null ? '–' : duration(ms));
export const readyText = ({ ready, of }: { ready: number; of: number }): string => (of === 0 ? '–' : `${ready} of ${of}`);
/** Frames per stop: `540`, or `more than 1 200` while nothing stopped. */
export function perStopText(per: NightFigures['total']['framesPerStop']): string {
  if (!per) return '–';
  return per.value === null ? `more than ${number(per.low)}` : number(per.value);
}

/** `Wednesday` of a local date. */
const weekday = (date: string): string => longDate(date).split(' ')[0] ?? '';

export const KIND_NAMES: Record<CountKind, string> = {
  league: 'League', tournament: 'Tournament', open: 'Open play', party: 'Party', warmup: 'Warm-up', coaching: 'Coaching', maintenance: 'Maintenance',
  unknown: 'Not said', unassigned: 'Unassigned',
};

export const wording = {
  loading: 'Working out the night’s figures',
  nightOf: (date: string) => `Night of ${dayOfDate(date)}`,
  running: 'still running',
  asOf: (time: string) => `as of ${time}`,
  issued: (time: string) => `Report issued ${time}`,
  notIssued: 'The report is issued 15 minutes after the cut.',
  sameAsIssued: 'The figures are as they were issued.',
  differ: (count: number) => `${plural(count, 'figure')} came out otherwise since the report was issued.`,
  differCount: (count: number) => plural(count, 'figure'),
  differWhere: ({ lane, kind }: Difference) => (lane === null ? (kind === null ? 'The house' : KIND_NAMES[kind]) : `Lane ${lane}`),
  differRow: ({ figure, issued, now }: Difference) => `${DIFFER_NAMES[figure] ?? figure}: issued ${differValue(figure, issued)}, now ${differValue(figure, now)}`,
  thisNight: 'night',
  past: (n: number, date: string) => (n === 0 ? `no earlier ${weekday(date)}s` : `last ${plural(n, weekday(date))}`),
  earlier: 'Night before',
  later: 'Night after',
  today: 'Tonight',
  choose: 'Business date',
  byLane: 'By lane',
  byKind: 'By kind of play',
  sortBy: (column: string) => `Sort by ${column}`,
  print: 'Print',
  failed: 'The figures couldn’t be fetched',
  retry: 'Try again',
  whichLane: 'Which lane is really worse?',
  lane: 'Lane',
  kind: 'Kind',
  played: 'Played',
  occupancy: 'Occupancy',
  deliveries: 'Deliveries',
  frames: 'Frames',
  lineage: 'Lineage',
  stops: 'Stops',
  gross: 'All calls',
  rate: 'Calls per 1 000 frames',
  perStop: 'Frames per stop',
  down: 'Down',
  wanted: 'of it wanted',
  interval: '95% interval',
  estimated: (frames: number) => `and ${number(frames)} estimated frames, kept apart`,
  funnelLead: 'Calls per thousand frames over the last eight weeks, each lane against what its own number of frames allows.',
  byChance: (count: number, lanes: number) => `Of ${plural(lanes, 'lane')}, ${number(count, 1)} would leave the band by chance.`,
  axisFrames: 'frames bowled on the lane, last eight weeks',
  axisRate: 'calls per 1 000 frames',
  funnelLabel: (finding: string) => `Chart of lanes. ${finding}`,
  band: 'what chance allows, 95%',
  outer: '99.8%',
  tableBehind: 'The lanes as a table',
  position: 'Against chance',
  noNight: 'No figures for this night',
  noNightWhy: 'Nothing was counted and no call was raised.',
  definitions: 'How these figures are made',
  definition: [
    'A machine stop is one incident, however often it halted before somebody cleared it. Stops by bowlers and foreign objects are counted apart.',
    'Rates are of scored frames outside warm-up; the interval is exact (Poisson, 95%).',
    'Occupancy is league, paid and unpaid time over opening hours; a lane forgotten open ends ten minutes after its last delivery.',
    'Down is from stop to restart or back in service, clipped to opening hours and never added twice; wanted is the part in which somebody had or had booked the lane.',
    'League minutes lost count a pair once, and none while they bowl on its other lane.',
  ],
};

type Difference = NightView['differs'][number];

const DIFFER_NAMES: Record<string, string> = {
  frames: 'Frames', framesEstimated: 'Estimated frames', deliveries: 'Deliveries', games: 'Games', stops: 'Machine stops', calls: 'Calls', bowlerCalls: 'Bowlers’ calls',
  foreignCalls: 'Foreign objects', occupancy: 'Occupancy', occupancyInService: 'Occupancy of lanes in service', downMs: 'Downtime', wantedDownMs: 'Downtime wanted',
  leagueLostMs: 'League minutes lost', acknowledgedMs: 'Acknowledged, median', onLaneMs: 'Mechanic on lane, median', restoredMs: 'Restored, median',
  playedMs: 'Time played', ready: 'Sessions ready', readyOf: 'Sessions', lanesDressed: 'Lanes dressed', dressedUl: 'Conditioner',
};

export const POSITIONS: Record<string, string> = {
  'inside': 'inside', 'above-inner': 'high', 'above-outer': 'far too high', 'below-inner': 'low', 'below-outer': 'far below', 'no-frames': 'no frames',
};

/** A value of a difference, by its figure. */
function differValue(figure: string, value: number | null): string {
  if (value === null) return '–';
  if (figure.endsWith('Ms')) return duration(value);
  if (figure === 'dressedUl') return millilitres(value, 1);
  return figure.startsWith('occupancy') ? percent(value * 100, 1) : number(value);
}

/** Rows of the night beside its weekday's past: name, tonight's value and how to write the past's. */
export interface NightRow {
  figure: PastFigure;
  name: string;
  value: string;
  note: string;
  past: (value: number) => string;
}

export function nightRows(figures: NightFigures): NightRow[] {
  const { total } = figures;
  const ulPerLane = figures.dressed.told === 0 ? null : figures.dressed.ul / figures.dressed.told;
  const occupancyNote = total.occupancyInService === null || shareText(total.occupancyInService) === shareText(total.occupancyOfAll) ? '' : `${shareText(total.occupancyInService)} of lanes in service`;
  return [
    { figure: 'occupancy', name: 'Occupancy', value: shareText(total.occupancyOfAll), note: occupancyNote, past: (v) => shareText(v) },
    { figure: 'frames', name: 'Frames', value: number(total.frames), note: `${number(total.lineage, 1)} lineage`, past: (v) => number(v) },
    { figure: 'rate', name: 'Calls per 1 000', value: rateText(total.rate), note: intervalText(total.rate), past: (v) => number(v, 2) },
    { figure: 'onLaneMs', name: 'Mechanic on lane, median', value: timeText(figures.onLane.median), note: figures.onLane.n === 0 ? '' : `${plural(figures.onLane.n, 'call')}, 90% within ${timeText(figures.onLane.p90)}`, past: (v) => timeText(v) },
    { figure: 'downMs', name: 'Down', value: duration(total.downMs), note: `${duration(total.wantedDownMs)} wanted`, past: (v) => duration(v) },
    { figure: 'leagueLostMs', name: 'League minutes lost', value: duration(figures.leagueLostMs), note: '', past: (v) => duration(v) },
    { figure: 'readyShare', name: 'Ready at warm-up', value: readyText(figures.ready), note: '', past: (v) => shareText(v) },
    { figure: 'ulPerLane', name: 'Conditioner a lane', value: ulPerLane === null ? '–' : millilitres(ulPerLane, 1), note: plural(figures.dressed.lanes, 'lane dressed', 'lanes dressed'), past: (v) => millilitres(v, 1) },
  ];
}

const escape = (text: string): string => text.replace(/[&<>"]/g, (c) => `&#${c.charCodeAt(0)};`);

/** The night report as a letter, plain and HTML. */
export function nightReportMail(centre: string, date: string, figures: NightFigures): { subject: string; text: string; html: string } {
  const rows = nightRows(figures).map((r) => [r.name, r.note ? `${r.value} (${r.note})` : r.value] as const);
  const worst = figures.byLane.filter((l) => l.stops > 0).sort((a, b) => b.stops - a.stops).slice(0, 3);
  const lanes = worst.length === 0 ? 'No machine stopped.' : `Most stops: ${worst.map((l) => `lane ${l.lane} ${l.stops}`).join(', ')}. One night says little about one lane.`;
  const head = `${centre}, night of ${longDate(date)}`;
  return {
    subject: `${centre}: night of ${dayOfDate(date)}`,
    text: `${head}\n\n${rows.map(([name, value]) => `${name}: ${value}`).join('\n')}\n\n${lanes}\n`,
    html: `<h1>${escape(head)}</h1><table>${rows.map(([name, value]) => `<tr><td>${escape(name)}</td><td><b>${escape(value)}</b></td></tr>`).join('')}</table><p>${escape(lanes)}</p>`,
  };
}
