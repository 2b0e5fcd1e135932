import type { LaneMark } from '../../domain/readiness/check.ts';
import type { Because } from '../../domain/readiness/confirmation.ts';
import type { Outstanding, SessionVerdict } from '../../domain/readiness/session.ts';
import { laneRanges, lanesText, listed } from './formats.ts';
import { checkNames, checkSentence, type Clock, laneSubject } from './readiness-checks.ts';
import type { Sentences } from './sentences.ts';

export * from './readiness-checks.ts';

export const verdictNames: Record<SessionVerdict, string> = { 'planned': 'As planned', 'at-risk': 'At risk', 'held': 'Held', 'ready': 'Ready' };
export const markNames: Record<LaneMark, string> = { 'ok': 'ready', 'waits': 'waits for what is planned', 'at-risk': 'at risk', 'holds': 'holds' };

const NUMBERS = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine', 'Ten', 'Eleven', 'Twelve'];
const spelled = (n: number): string => NUMBERS[n] ?? String(n);

export interface Spoken {
  /** `Ready.`, `Not ready yet.` */
  lead: string;
  rest: string;
}

/** The finding about a session before its warm-up: what it is, and what is outstanding, worst first after those that are ready. */
export function sessionSentence(verdict: SessionVerdict, lanes: readonly number[], open: readonly Outstanding[], clock: Clock): Spoken {
  const ready = lanes.length - new Set(open.flatMap((group) => group.lanes)).size;
  if (verdict === 'ready') return { lead: 'Ready.', rest: lanes.length === 1 ? `Lane ${lanes[0]} is as asked.` : `All ${spelled(lanes.length).toLowerCase()} lanes are as asked.` };
  const leads: Record<SessionVerdict, string> = { 'planned': 'As planned.', 'at-risk': 'At risk.', 'held': 'Not ready yet.', 'ready': 'Ready.' };
  const count = ready === 0 ? '' : ready === 1 ? 'One lane is ready; ' : `${spelled(ready)} lanes are ready; `;
  const [calm, wrong] = [open.filter((g) => g.check.verdict === 'ok'), open.filter((g) => g.check.verdict !== 'ok')];
  const sentences = [...calm, ...wrong].map((group) => checkSentence(group.lanes, group.check, clock));
  return { lead: leads[verdict], rest: joined(count, sentences) };
}

function joined(count: string, sentences: readonly string[]): string {
  const [first = '', ...rest] = sentences;
  const head = count === '' || first === '' ? count + first : count + first.charAt(0).toLowerCase() + first.slice(1);
  return [head, ...rest].join(' ');
}

/** One sentence for a bar: the worst thing outstanding. */
export function barSentence(verdict: SessionVerdict, lanes: readonly number[], open: readonly Outstanding[], clock: Clock): string {
  const worst = open[0];
  return worst ? checkSentence(worst.lanes, worst.check, clock) : sessionSentence(verdict, lanes, [], clock).rest;
}

/** From warm-up on: how it was then. */
export function frozenSentence(verdict: SessionVerdict): string {
  const was: Record<SessionVerdict, string> = { 'ready': 'Was ready at warm-up.', 'planned': 'Was not quite ready at warm-up.', 'at-risk': 'Was at risk at warm-up.', 'held': 'Was not ready at warm-up.' };
  return was[verdict];
}

export function becauseSentence({ code, params }: { code: string; params: Because['params'] }, clock: Clock): string {
  const lanesOf = (name: string) => laneRanges(String(params[name] ?? '').split(',').map(Number));
  if (code === 'reopened.lanes') return `Its lanes were changed from ${lanesOf('before')} to ${lanesOf('after')}.`;
  if (code === 'reopened.pattern') return 'The pattern asked for was changed.';
  if (code === 'reopened.time') return `Its start was changed from ${clock(Number(params['beforeAt']))} to ${clock(Number(params['afterAt']))}.`;
  const check = String(params['check']) as keyof typeof checkNames;
  return `Lane ${params['lane']} got worse: ${(checkNames[check] ?? check).toLowerCase()}.`;
}

export type SaidOffer =
  | { kind: 'move'; fromPair: number; toPair: number; deliveries: number | null }
  | { kind: 'dress-then-move'; fromPair: number; toPair: number; machine: string; startAt: number; doneAt: number }
  | { kind: 'one-lane'; fromPair: number; lane: number; delayMs: number };

const pair = (odd: number): string => `${odd}–${odd + 1}`;
export const offerTitle = (offer: SaidOffer): string =>
  offer.kind === 'one-lane' ? `Bowl on lane ${offer.lane} alone` : offer.kind === 'move' ? `Move ${pair(offer.fromPair)} to ${pair(offer.toPair)}` : `Dress ${pair(offer.toPair)}, then move ${pair(offer.fromPair)} there`;

export function offerText(offer: SaidOffer, clock: Clock): string {
  if (offer.kind === 'one-lane') return `Both teams of ${pair(offer.fromPair)} finish about ${Math.round(offer.delayMs / 60_000)} min later than the rest.`;
  if (offer.kind === 'move') return `Same revision, ${offer.deliveries ?? 0} deliveries since dressing, in service, wanted by nobody until the end.`;
  return `${offer.machine} can begin at ${clock(offer.startAt)} and is done at ${clock(offer.doneAt)}. Wanted by nobody until the end.`;
}

export const offersTitle = (failing: readonly number[]): string => `If ${listed(failing.map(pair))} ${failing.length === 1 ? 'isn’t' : 'aren’t'} back`;
export const noneUntilText = (at: number, clock: Clock): string => `No pair is free until ${clock(at)}.`;
export const confirmLabel = (lanes: readonly number[]): string => `Confirm ${lanesText(lanes)}`;
export const momentText = (kind: 'settles' | 'latest', lanes: readonly number[]): string => (kind === 'latest' ? `${laneRanges(lanes)}, at the latest` : `${laneRanges(lanes)} settled`);

export const refusals: Sentences = {
  'booking.unknown': () => 'There is no such session here.',
  'readiness.holds': ({ lanes }) => `${lanes === undefined ? 'Something' : laneSubject(String(lanes).split(',').map(Number))} still holds. Look at the page again.`,
  'readiness.frozen': () => 'Warm-up has begun: readiness is closed. What stops now is a call.',
  'readiness.already-confirmed': ({ by }) => `${String(by)} has confirmed this already.`,
  'readiness.not-watched': () => 'Only leagues and tournaments are confirmed.',
  'readiness.lane-not-of-session': ({ lane }) => `Lane ${String(lane)} isn’t one of this session’s.`,
  'readiness.pair-not-of-session': ({ pair: odd }) => `Lanes ${pair(Number(odd))} aren’t this session’s.`,
  'readiness.pair-not-free': ({ pair: odd }) => `Lanes ${pair(Number(odd))} can’t be had for the whole session. Look at the offers again.`,
  'concern.unknown': () => 'There is no such concern here.',
  'concern.settled': ({ by }) => `${String(by)} has settled this already.`,
};
