import { describe, expect, it } from 'vitest';
import type { LaneView, RunBar, SessionBar } from '../../contracts/floor.ts';
import { callWho, laneSentence, levelsText, pipsText, runText, sessionNextText, sessionNowText, useText } from './floor.ts';

const NOW = Date.parse('2026-05-14T18:42:00Z');
const MINUTE = 60_000;
const film = { lengthFt: 41, strength: 0.8, deliveries: 96, at: NOW - 90 * MINUTE, pattern: 'TS', revision: 2, verified: true, freshness: 'fresh' as const };
const lane = (change: Partial<LaneView> = {}): LaneView => ({
  lane: 9, use: null, progress: null, bumpers: false, machine: 'running', stoppedSince: null, pins: null, outOfService: null, call: null, mechanicIn: null,
  film, brokenOff: false, dressing: null, unheard: false, hearsDeliveries: true, ...change,
});
const use = (change: Partial<NonNullable<LaneView['use']>> = {}): NonNullable<LaneView['use']> => ({
  kind: 'league', label: 'Thursday Scratch', since: NOW, until: null, bowlers: 4, games: 3, session: null, quiet: false, ...change,
});
const call = (change: Partial<NonNullable<LaneView['call']>> = {}): NonNullable<LaneView['call']> => ({
  id: '0190a000-0000-7000-8000-000000000001', status: 'unanswered', since: NOW - 192_000, equipment: 'ball-return', safety: null, returned: false, ...change,
});
const say = (change: Partial<LaneView>) => laneSentence(lane(change), NOW);

describe('the sentence of a lane', () => {
  it('says everything that is drawn', () => {
    expect(say({ use: use(), call: call(), machine: 'unknown' })).toBe('Lane 9, league Thursday Scratch, call unanswered 3 min 12 s, ball not returned, film 41 ft 96 deliveries');
  });

  /** What each type of device event changes in a lane's view, and the words that it adds. */
  const effects: [event: string, before: Partial<LaneView>, after: Partial<LaneView>, words: string][] = [
    ['lane.opened', {}, { use: use({ kind: 'open', label: null }) }, 'open play'],
    ['lane.opened with a label', {}, { use: use({ kind: 'party', label: 'Marchbank' }) }, 'party Marchbank'],
    ['lane.opened with bumpers', {}, { use: use(), bumpers: true }, 'bumpers up'],
    ['lane.closed', { use: use() }, {}, 'free'],
    ['lane.moved, the lane left', { use: use() }, { use: null }, 'free'],
    ['lane.moved, the lane reached', {}, { use: use() }, 'league Thursday Scratch'],
    ['lane.counted', {}, { film: { ...film, deliveries: 97 } }, '97 deliveries'],
    ['nothing counted for ten minutes', { use: use() }, { use: use({ quiet: true }) }, 'nothing bowled for ten minutes'],
    ['game.progress', { use: use() }, { use: use(), progress: { game: 2, frame: 6 } }, 'game 2 frame 6'],
    ['pinsetter.off', {}, { machine: 'off' }, 'pinsetter off'],
    ['pinsetter.on', { machine: 'off' }, { machine: 'running' }, 'pinsetter on'],
    ['pinsetter.stopped', {}, { machine: 'stopped', stoppedSince: NOW - 65_000, call: call({ equipment: 'pinsetter', since: NOW - 65_000 }) }, 'call unanswered 1 min 5 s, pinsetter'],
    ['pinsetter.stopped, with its clock', {}, { machine: 'stopped', stoppedSince: NOW - 65_000 }, 'pinsetter stopped 1 min 5 s'],
    ['pinsetter.stopped, with pins', {}, { machine: 'stopped', stoppedSince: NOW, pins: [7, 10] }, 'pins 7 10 stand'],
    ['pinsetter.restarted', { call: call() }, { call: call({ equipment: 'pinsetter', returned: true }) }, 'runs again, pinsetter: cause missing'],
    ['equipment.faulted', {}, { call: call({ equipment: 'foul-unit' }) }, 'call unanswered 3 min 12 s, foul unit'],
    ['equipment.restored', { call: call() }, { call: call({ returned: true }) }, 'runs again, ball not returned: cause missing'],
    ['call.requested', {}, { call: call({ equipment: 'bumpers', since: NOW }) }, 'call unanswered 0 s, bumpers'],
    ['run.started', {}, { dressing: { machine: 'm1', run: '118', since: NOW, paceMs: 120_000 } }, 'being dressed, run 118'],
    ['run.lane.dressed', { film: null }, { film: { ...film, deliveries: 0 } }, 'film 41 ft 0 deliveries'],
    ['run.lane.dressed, unverified', {}, { film: { ...film, verified: false } }, 'pattern unverified'],
    ['run.lane.dressed, pattern unknown', {}, { film: { ...film, lengthFt: null } }, 'film of unknown length 96 deliveries'],
    ['run.aborted', {}, { brokenOff: true }, 'dressing broken off: clean and redo before play'],
    ['a gateway silent for 90 s', {}, { unheard: true }, 'not heard: as last known'],
  ];
  it.each(effects)('%s', (_event, before, after, words) => {
    expect(say(after)).toContain(words);
    expect(say(before)).not.toContain(words);
  });

  it.each([
    ['acknowledged', call({ status: 'acknowledged' }), 'mechanic on the way 3 min 12 s, ball not returned'],
    ['on lane', call({ status: 'on-lane' }), 'mechanic on lane 3 min 12 s'],
    ['parked', call({ status: 'parked' }), 'call parked, ball not returned'],
    ['a danger', call({ safety: 'wet-approach' }), 'danger: wet or oily approach'],
  ])('a call that is %s', (_what, given, words) => expect(say({ call: given })).toContain(words));
  it('what people do: out of service, mechanic in the machine', () => {
    expect(say({ outOfService: { since: NOW, reason: 'belt', by: 'Odell' } })).toContain('out of service: belt');
    expect(say({ mechanicIn: { by: 'Odell', since: NOW - 40 * MINUTE } })).toContain('mechanic in machine: Odell, 40 min');
  });
  it('says nothing of what no gateway tells', () => {
    expect(laneSentence(lane({ machine: 'unknown', film: null, hearsDeliveries: false }), NOW)).toBe('Lane 9, free, film unknown');
    expect(say({ hearsDeliveries: false, film: { ...film, deliveries: 0 }, machine: 'unknown' })).toBe('Lane 9, free, film 41 ft');
  });
});

describe('bars and sides', () => {
  const session: SessionBar = {
    id: 's', name: 'Night Owls', kind: 'league', fromLane: 25, toLane: 28, warmUpAt: NOW + 23 * MINUTE, startAt: NOW + 33 * MINUTE, endAt: NOW + 175 * MINUTE, phase: 'next', verdict: 'at-risk',
    says: '27 waits', lanes: [{ lane: 25, state: 'ok' }, { lane: 26, state: 'ok' }, { lane: 27, state: 'holds' }, { lane: 28, state: 'waits' }], confirmed: null, game: 2, frame: null,
  };
  it('what comes says when, what plays says where it is', () => {
    expect(sessionNextText(session, 'Europe/London')).toMatchObject({ title: 'Night Owls 20:15', short: 'NO', second: ['2 of 4', '27 waits'] });
    expect(sessionNowText(session, 'Europe/London').second).toEqual(['game 2', 'about 22:37']);
    expect(sessionNowText({ ...session, phase: 'warm-up', game: null }, 'Europe/London').second).toEqual(['warm-up till 20:15', 'about 22:37']);
  });
  it('both lanes of a pair say their ends, once when they are the same', () => {
    const until = (minutes: number) => use({ kind: 'open', label: null, until: NOW + minutes * MINUTE });
    expect(useText([until(33), until(33)], 'Europe/London')).toEqual({ title: 'Open', short: 'O', second: ['20:15'] });
    expect(useText([until(48), until(33)], 'Europe/London').second).toEqual(['20:15 and 20:30']);
  });
  it('pips say in words which lanes are how', () => expect(pipsText(session)).toBe('lanes 25–26 ready; lane 28 wait as planned; lane 27 held'));
  it('a run says what is dressed, where it is, when it is through, and that its pattern is unverified', () => {
    const run: RunBar = { key: 'm/118', run: '118', machine: 'm', status: 'under-way', pattern: null, verified: false, lanes: [25, 26, 27], done: 2, startAt: NOW, endAt: NOW + 3 * MINUTE, forecast: true, laneNow: 27 };
    expect(runText(run, 'Europe/London').second).toEqual(['2 of 3 dressed', '27 now', 'done about 19:45', 'pattern unverified']);
  });
  it('machine.levels: only what was told', () => {
    expect(levelsText({ tankAMl: 1480, tankBMl: null, cleanerMl: null, wasteMl: null, batteryPct: 76 })).toBe('A 1\u202f480 mL · battery 76%');
  });
  it('who has a call', () => {
    const view = { mechanicIn: null, returnedAt: null, status: 'unanswered', escalation: 'desk', mechanic: null, parkedUntil: null } as unknown as Parameters<typeof callWho>[0];
    expect(callWho(view, NOW)).toBe('unanswered: desk');
    expect(callWho({ ...view, status: 'on-lane', mechanic: { id: 'x', name: 'Odell' } }, NOW)).toBe('Odell, on lane');
  });
});
