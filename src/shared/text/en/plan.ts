import type { CodeParams, Sentences } from './sentences.ts';
import type { CannotLay, CannotLayCode } from '../../domain/runs/capability.ts';
import type { Explanation, Plan, PlanCode } from '../../domain/runs/plan/model.ts';
import type { PatternProblem, PatternProblemCode } from '../../domain/runs/rules.ts';
import { duration, feet, listed, millilitres, plural } from './formats.ts';

/** `19:42` of an instant in the centre's zone. */
type Clock = (at: number) => string;
type Params = Readonly<Record<string, number | string>>;

const text = (params: Params, name: string): string => String(params[name] ?? '');
const count = (params: Params, name: string): number => Number(params[name] ?? 0);

const STORE: Record<string, string> = { tankA: 'conditioner A', tankB: 'conditioner B', cleaner: 'cleaner', waste: 'room for waste', battery: 'charge' };
const amount = (store: string, value: number): string => (store === 'battery' ? `${Math.round(value / 100)}%` : millilitres(value, 0));

const BECAUSE: Record<PlanCode, (params: Params, clock: Clock) => string> = {
  'late.even-alone': () => 'No order helps: its lanes would be late even if nothing else were dressed.',
  'late.waits-for-block': (p, clock) => `Machine ${text(p, 'machine')} is on other lanes until ${clock(count(p, 'until'))}.`,
  'late.lanes-free-at': (p, clock) => `Lane ${text(p, 'lane')} and its pair are free at ${clock(count(p, 'at'))}.`,
  'late.machine-available-at': (p, clock) => `Machine ${text(p, 'machine')} can begin at ${clock(count(p, 'at'))}.`,
  'late.machine-away': (p, clock) => `Machine ${text(p, 'machine')} isn’t to be had until ${clock(count(p, 'until'))}.`,
  'late.lanes-closed': (p, clock) => `Lane ${text(p, 'lane')} is in play until ${clock(count(p, 'until'))}.`,
  'late.pinned-start': (p, clock) => `Its start was set to ${clock(count(p, 'at'))} by hand.`,
  'late.pattern-change': (p) => `Changing to pattern ${text(p, 'pattern')} takes ${duration(count(p, 'ms'))}.`,
  'late.product-change': (p) => `Changing to product ${text(p, 'product')} takes ${duration(count(p, 'ms'))}.`,
  'late.service': (p) => `${text(p, 'service') === 'charge' ? 'Charging' : 'Refilling'} takes ${duration(count(p, 'ms'))}.`,
  'late.travel': (p) => `Getting machine ${text(p, 'machine')} there takes ${duration(count(p, 'ms'))}.`,
  'late.dressing': (p) => `Dressing these lanes with machine ${text(p, 'machine')} takes ${duration(count(p, 'ms'))}.`,
  'block.no-machine': (p) => `No machine here can lay pattern ${text(p, 'pattern')}.`,
  'block.no-pattern': () => 'The session names no pattern: choose one and plan its run by hand.',
  'block.exceeds-store': (p) =>
    `Machine ${text(p, 'machine')} holds ${amount(text(p, 'store'), count(p, 'holds'))} of ${STORE[text(p, 'store')] ?? text(p, 'store')}, these lanes need ${amount(text(p, 'store'), count(p, 'need'))}: plan fewer lanes in one go.`,
  'pins.conflict': () => 'What was set by hand contradicts itself: no order keeps all of it. Free one of the set starts or orders.',
  'stores.run-out': () => 'No order lasts: a tank or the battery runs out and nothing fills it.',
};

/** One reason as a sentence; times in the centre's zone. */
export const planReason = (because: Explanation, clock: Clock): string => BECAUSE[because.code](because.params, clock);

export const planText = {
  lateBy: (session: string, byMs: number) => `${session} will be ready ${duration(byMs)} late`,
  unplanned: (name: string) => `${name} can’t be planned`,
} as const;

/** `Heron: conditioner A runs out before lane 29, 12 mL short. Fill it first.` */
export const runsOutText = (machine: string, out: { store: string; lane: number; shortUl: number }): string =>
  `${machine}: ${STORE[out.store] ?? out.store} runs out before lane ${out.lane}, ${millilitres(out.shortUl, 1)} short. Fill it first.`;

/** How good the plan is known to be. */
export function proofText(plan: Pick<Plan, 'proven' | 'method' | 'criteria' | 'bound'>): string {
  const { proven, criteria, bound } = plan;
  if (!proven.sessionsLate) {
    return `At best ${plural(bound.sessionsLate, 'session')} late; this plan has ${plural(criteria.sessionsLate, 'late session')}`;
  }
  if (!proven.lateness) return `Within ${duration(criteria.latenessMs - bound.latenessMs)} of the best possible`;
  if (plan.method === 'exact' && proven.freshness && proven.travel) return 'Proven best with these blocks';
  const best = ['sessions late', 'lateness', ...(proven.freshness ? ['freshness'] : []), ...(proven.travel ? ['travel'] : [])];
  return `Proven best in ${listed(best)}`;
}

const CANNOT: Record<CannotLayCode, (params: Params) => string> = {
  'machine.cannot-oil': () => 'this machine only cleans',
  'machine.cannot-clean': () => 'this machine doesn’t clean',
  'machine.no-deck-treatment': () => 'this machine has no deck treatment',
  'machine.product-not-carried': (p) => `it carries no product ${text(p, 'product')}`,
  'machine.one-volume-only': (p) => `it lays ${text(p, 'machineUl')} µL a board only, asked are ${text(p, 'ul')}`,
  'machine.volume-out-of-range': (p) => `it lays ${text(p, 'min')} to ${text(p, 'max')} µL a board, asked are ${text(p, 'ul')}`,
  'machine.volume-step': (p) => `its volumes go in steps of ${text(p, 'step')} µL, ${text(p, 'ul')} isn’t one`,
  'machine.board-out-of-reach': (p) => `its oil head reaches boards ${text(p, 'first')} to ${text(p, 'last')} from the left`,
  'machine.length-too-long': (p) => `it goes to ${feet(count(p, 'max'))}, the pattern to ${feet(count(p, 'ft'))}`,
  'machine.into-tail-off': (p) => `it only buffs beyond ${feet(count(p, 'max'))}, oil is asked up to ${feet(count(p, 'ft'))}`,
  'machine.too-many-passes': (p) => `it stores ${text(p, 'max')} passes, the pattern has ${text(p, 'passes')}`,
  'machine.too-many-loads': (p) => `it makes at most ${text(p, 'max')} loads a pass, asked are ${text(p, 'loads')}`,
  'machine.buffer-speed': (p) => `its buffer runs at ${text(p, 'has')} rpm, asked are ${text(p, 'rpm')}`,
  'machine.travel-speed': (p) => `it can’t travel at ${count(p, 'speed') / 10} in/s`,
  'machine.cleaner-ratio': (p) => `it can’t mix ${text(p, 'parts')} parts of water to one of concentrate`,
  'machine.cleaner-zones': (p) => `it knows ${text(p, 'max')} cleaner zones, the pattern has ${text(p, 'zones')}`,
};

const where = (place: { pass?: number; zone?: number }): string => (place.pass ? `Pass ${place.pass}: ` : place.zone ? `Cleaner zone ${place.zone}: ` : '');
const capital = (sentence: string): string => sentence.charAt(0).toUpperCase() + sentence.slice(1);

/** Why a machine can't lay a pattern, with the pass: `Pass 3: it carries no product B.` */
export const cannotLayText = (reason: CannotLay): string => capital(`${where(reason)}${CANNOT[reason.code](reason.params)}.`);

const between = (p: Params): string => `between ${text(p, 'min')} and ${text(p, 'max')}`;

const PATTERN: Record<PatternProblemCode, (params: Params) => string> = {
  'pattern.length-out-of-range': (p) => `The length must be ${between(p)} ft, in tenths.`,
  'pattern.no-passes': () => 'A pattern needs at least one pass.',
  'pattern.too-many-passes': (p) => `At most ${text(p, 'max')} passes.`,
  'pass.direction-unknown': () => 'outbound or return?',
  'pass.outbound-after-return': () => 'an outbound pass can’t follow a return pass.',
  'pass.product-missing': () => 'which product, A or B?',
  'pass.board-out-of-range': (p) => `a board is ${between(p)}, counted from either channel.`,
  'pass.boards-crossed': () => 'the range crosses itself: the second board lies left of the first.',
  'pass.feet-out-of-range': (p) => `feet must be ${between(p)}, in tenths.`,
  'pass.feet-beyond-length': (p) => `the pattern ends at ${feet(count(p, 'max'))}.`,
  'pass.feet-against-direction': () => 'outbound passes go away from the foul line, return passes towards it.',
  'pass.feet-empty': () => 'it begins and ends at the same foot.',
  'pass.into-tail-off': (p) => `no oil beyond ${feet(count(p, 'max'))}: the machine only buffs there.`,
  'pass.loads-out-of-range': (p) => `loads are whole numbers ${between(p)}.`,
  'pass.load-volume-out-of-range': (p) => `a load is ${between(p)} µL a board, whole numbers.`,
  'pass.speed-out-of-range': (p) => `travel speed is ${count(p, 'min') / 10} to ${count(p, 'max') / 10} in/s.`,
  'pass.rpm-out-of-range': (p) => `buffer speed is ${between(p)} rpm.`,
  'zone.feet-out-of-range': (p) => `feet must be ${between(p)}, in tenths.`,
  'zone.feet-reversed': () => 'it ends before it begins.',
  'zone.overlap': () => 'it begins before the zone above ends.',
  'zone.ratio-out-of-range': (p) => `parts of water are ${between(p)}.`,
  'zone.volume-out-of-range': (p) => `cleaner is ${between(p)} µL a foot.`,
};

/** A contradiction in a pattern, with its place: `Pass 3: the range crosses itself …` */
export const patternProblemText = (problem: PatternProblem): string => capital(`${where(problem.place)}${PATTERN[problem.code](problem.params ?? {})}`);

/** The same sentences by code, for refusals that stand beside the field of their pass. */
export const ruleSentences: Sentences = Object.fromEntries([
  ...Object.entries(CANNOT).map(([code, say]) => [code, (params: CodeParams) => capital(`${say(params)}.`)] as const),
  ...Object.entries(PATTERN).map(([code, say]) => [code, (params: CodeParams) => capital(say(params))] as const),
]);
