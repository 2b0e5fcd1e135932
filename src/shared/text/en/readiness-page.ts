import type { SessionVerdict } from '../../domain/readiness/session.ts';
import { laneRanges, plural } from './formats.ts';
import { type Clock, listedLanes } from './readiness-checks.ts';

/** Words of the pages of readiness. */
export const readinessText = {
  loading: 'Readiness', failed: 'Readiness can’t be shown.', retry: 'Try again', back: 'All sessions', tonight: 'Tonight', none: 'No league or tournament is booked today.',
  noneMore: 'Leagues make their sessions by themselves; the desk books the rest.', noneOwn: 'Your league doesn’t bowl today.', noneOwnMore: 'On its next night its lanes are shown here.',
  others: 'Also on lanes', othersNote: 'not watched', weights: 'What holds',
  columns: { lane: 'Lane', state: 'State', pattern: 'Pattern', free: 'Lane free', pinsetter: 'Pinsetter', other: 'Other', waitsFor: 'Waits for' },
  tableCaption: 'Lanes of the session and what every check says', timeline: 'Until warm-up', now: 'now', warmUp: 'warm-up', start: 'start', ok: 'OK',
  frozen: 'Warm-up has begun. This is how it was then; what stops now is a call.', cancelled: 'This session was cancelled.', noVerdict: 'Nothing was recorded before warm-up.',
  word: 'Your word', wordMore: 'Play doesn’t wait for it. If a lane gets worse before warm-up, this opens again and you are told.', wordOfSecretary: 'The secretary’s word',
  raise: 'Raise a concern', raiseLead: 'The desk hears of it at once.', concernText: 'What is wrong', concernLane: 'Lane', wholeSession: 'The whole session', send: 'Tell the desk',
  concerns: 'Concerns', settle: 'Settle', settleTitle: 'Settle the concern', settleNote: 'How it was settled', askDesk: 'Ask the desk for this', notConfirmed: 'Not confirmed yet. That is information: play doesn’t wait for it.',
  confirmFirst: 'Something holds: it can’t be confirmed yet.', weightsLead: 'For every check: does a failing one hold the session, only warn, or isn’t it looked at?', save: 'Save', saved: 'Saved.',
  weightNames: { holds: 'Holds', warns: 'Warns', ignored: 'Ignored' }, fresh: 'fresh lanes', sanctioned: 'sanctioned',
} as const;

const LEADS: Record<SessionVerdict, string> = { 'ready': 'is ready', 'planned': 'goes as planned', 'at-risk': 'is at risk', 'held': 'isn’t ready yet' };
const WORST: readonly SessionVerdict[] = ['ready', 'planned', 'at-risk', 'held'];

/** The finding over the list: the worst session that is still to come. */
export function readinessTitle(sessions: readonly { name: string; verdict: SessionVerdict | null; frozen: boolean }[]): string {
  const ahead = sessions.flatMap((one) => (one.frozen || one.verdict === null ? [] : [{ name: one.name, verdict: one.verdict }]));
  if (ahead.length === 0) return sessions.length === 0 ? 'Nothing to get ready today.' : 'All sessions have begun.';
  const worst = ahead.reduce((a, b) => (WORST.indexOf(b.verdict) > WORST.indexOf(a.verdict) ? b : a));
  const same = ahead.filter((one) => one.verdict === worst.verdict);
  if (same.length === 1 || worst.verdict === 'held') return same.length === 1 ? `${worst.name} ${LEADS[worst.verdict]}.` : `${same.length} sessions aren’t ready yet.`;
  return worst.verdict === 'ready' ? 'All sessions are ready.' : worst.verdict === 'planned' ? 'All goes as planned.' : `${same.length} sessions are at risk.`;
}

export const sessionLead = (session: { lanes: readonly number[]; warmUpAt: number; startAt: number; teams: number | null; pattern: { code: string; name: string | null; revision: number | null } | null; fresh: boolean; sanctioned: boolean }, clock: Clock): string =>
  [
    listedLanes(session.lanes), `warm-up ${clock(session.warmUpAt)}`, `start ${clock(session.startAt)}`, ...(session.teams === null ? [] : [plural(session.teams, 'team')]),
    ...(session.pattern ? [`pattern ${session.pattern.name ?? session.pattern.code}${session.pattern.revision === null ? '' : `, revision ${session.pattern.revision}`}`] : []),
    ...(session.fresh ? [readinessText.fresh] : []), ...(session.sanctioned ? [readinessText.sanctioned] : []),
  ].join(' · ');

export const timesText = (session: { lanes: readonly number[]; warmUpAt: number; startAt: number }, clock: Clock): string =>
  session.warmUpAt === session.startAt ? `${listedLanes(session.lanes)} · ${clock(session.startAt)}` : `${listedLanes(session.lanes)} · warm-up ${clock(session.warmUpAt)}, start ${clock(session.startAt)}`;
export const confirmedText = (by: string, at: number, clock: Clock): string => `${by} confirmed at ${clock(at)}.`;
export const reopenedText = (at: number, clock: Clock): string => `Open again since ${clock(at)}.`;
export const pipsLabel = (marks: readonly { lane: number; mark: string }[]): string => {
  const of = (mark: string) => marks.filter((one) => one.mark === mark).map((one) => one.lane);
  const words = [['ok', 'ready'], ['waits', 'waiting'], ['at-risk', 'at risk'], ['holds', 'holding']] as const;
  return words.flatMap(([mark, word]) => (of(mark).length > 0 ? [`${laneRanges(of(mark))} ${word}`] : [])).join(', ');
};
export const concernsText = (count: number): string => `${plural(count, 'concern')} open`;
export const concernHead = (by: string, at: number, lane: number | null, clock: Clock): string => `${by}, ${clock(at)}${lane === null ? '' : `, lane ${lane}`}`;
export const settledText = (by: string, at: number, note: string, clock: Clock): string => `${by} settled it at ${clock(at)}: ${note}`;
export const takeMove = (toPair: number): string => `Move to ${toPair}–${toPair + 1}`;
export const movedText = (name: string, toPair: number): string => `${name} has lanes ${toPair}–${toPair + 1} now.`;
export const confirmedToast = (lanes: readonly number[]): string => `${listedLanes(lanes)} confirmed.`;
export const askedText = (title: string): string => `Please: ${title.charAt(0).toLowerCase()}${title.slice(1)}.`;
export const concernToast = 'The desk has been told.';
export const laneOption = (lane: number): string => `Lane ${lane}`;
export const markLabel = (lane: number, mark: string): string => `Lane ${lane}, ${mark}`;
