import { describe, expect, it } from 'vitest';
import type { LaneView, RunBar, SessionBar } from '#shared/contracts/floor.ts';
import { type Bar, groupLanes, nextBars, nowBars } from './bars.ts';

const lane = (n: number, use: Partial<NonNullable<LaneView['use']>> | null = null): LaneView => ({
  lane: n, use: use && { kind: 'open', label: null, since: 0, until: null, bowlers: null, games: null, session: null, quiet: false, ...use }, progress: null, bumpers: false, machine: 'running',
  stoppedSince: null, pins: null, outOfService: null, call: null, mechanicIn: null, film: null, brokenOff: false, dressing: null, unheard: false, hearsDeliveries: true,
});
const session = (id: string, from: number, to: number, startAt: number, change: Partial<SessionBar> = {}): SessionBar => ({
  id, name: id, kind: 'league', fromLane: from, toLane: to, warmUpAt: startAt - 1, startAt, endAt: startAt + 100, phase: 'later', verdict: 'planned', says: null, lanes: [], confirmed: null, game: null, frame: null, ...change,
});
const run = (lanes: number[], change: Partial<RunBar> = {}): RunBar => ({ key: 'm/1', run: '1', machine: 'm', status: 'under-way', pattern: null, verified: true, lanes, done: 0, startAt: 0, endAt: null, forecast: true, laneNow: null, ...change });
const spans = (bars: readonly Bar[]) => bars.map((b) => `${b.text.title} ${b.from}-${b.to} ${b.look}`);
const disjoint = (bars: readonly Bar[]) => bars.every((b, i) => i === 0 || bars[i - 1]!.to < b.from);

describe('what holds the lanes now', () => {
  const playing = session('Scratch', 1, 4, 10, { phase: 'now' });
  it('a league is one bar, open play one a pair, a run takes what nobody plays on', () => {
    const lanes = [lane(1, { session: 'Scratch' }), lane(2, { session: 'Scratch' }), lane(3, { session: 'Scratch' }), lane(4), lane(5, {}), lane(6, {}), lane(7, {}), lane(8), lane(9), lane(10)];
    const bars = nowBars(lanes, [playing], [run([7, 8, 9])], 'UTC');
    expect(spans(bars)).toEqual(['Scratch 1-4 league', 'Open 5-6 open', 'Open 7-7 open', 'Run 1 8-9 run']);
    expect(disjoint(bars)).toBe(true);
  });
  it('a party over three pairs is one bar; a gap in the lanes makes two', () => {
    const party = { kind: 'party' as const, label: 'Marchbank' };
    expect(spans(nowBars([lane(1, party), lane(2, party), lane(3, party), lane(4), lane(5, party)], [], [], 'UTC'))).toEqual(['Marchbank 1-3 open', 'Marchbank 5-5 open']);
  });
  it('a run that ended holds nothing', () => expect(nowBars([lane(1)], [], [run([1], { status: 'finished' })], 'UTC')).toEqual([]));
});

describe('what comes next', () => {
  it('each lane shows its earliest session, so that no two bars overlap', () => {
    const bars = nextBars(8, [session('Late', 1, 8, 50, { verdict: 'held' }), session('Early', 3, 4, 20, { verdict: 'at-risk' }), session('Past', 5, 6, 1, { phase: 'past' })], 'UTC');
    expect(bars.map((b) => `${b.from}-${b.to} ${b.look}`)).toEqual(['1-2 held', '3-4 risk', '5-8 held']);
    expect(disjoint(bars)).toBe(true);
  });
  it('follows lanes that were moved', () => {
    const moved = session('Moved', 1, 2, 20, { lanes: [{ lane: 1, state: 'ok' }, { lane: 7, state: 'ok' }] });
    expect(nextBars(8, [moved], 'UTC').map((b) => [b.from, b.to])).toEqual([[1, 1], [7, 7]]);
  });
});

it('turned a quarter, every lane stands once, in groups of what plays and what comes', () => {
  const lanes = [1, 2, 3, 4, 5, 6].map((n) => lane(n, n < 5 ? {} : null));
  const groups = groupLanes(6, nowBars(lanes, [], [], 'UTC'), nextBars(6, [session('Late', 3, 6, 50)], 'UTC'));
  expect(groups.flatMap((g) => g.lanes)).toEqual([1, 2, 3, 4, 5, 6]);
  expect(groups.map((g) => [g.look, g.lanes.length, g.next?.title ?? null])).toEqual([['open', 2, null], ['open', 2, 'Late 00:00'], ['free', 2, 'Late 00:00']]);
});
