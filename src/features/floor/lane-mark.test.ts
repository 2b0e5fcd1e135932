import { describe, expect, it } from 'vitest';
import type { LaneView } from '#shared/contracts/floor.ts';
import { capClock, changeSignature, filmShare, markOf, rigShare } from './lane-mark.ts';

const lane = (change: Partial<LaneView> = {}): LaneView => ({
  lane: 9, use: null, progress: null, bumpers: false, machine: 'running', stoppedSince: null, pins: null, outOfService: null, call: null, mechanicIn: null,
  film: null, brokenOff: false, dressing: null, unheard: false, hearsDeliveries: true, ...change,
});
const call = (status: NonNullable<LaneView['call']>['status'], change: object = {}): NonNullable<LaneView['call']> => ({ id: 'c', status, since: 5, equipment: 'pinsetter', safety: null, returned: false, ...change });
const film = { lengthFt: 41, strength: 0.8, deliveries: 96, at: 1, pattern: 'TS', revision: 2, verified: true, freshness: 'fresh' as const };

describe('the mark on a machine, what asks most for a person first', () => {
  it.each<[string, Partial<LaneView>, string, number | null]>([
    ['pinsetter.on', { machine: 'running' }, 'running', null],
    ['pinsetter.off', { machine: 'off' }, 'off', null],
    ['never heard', { machine: 'unknown' }, 'unknown', null],
    ['pinsetter.stopped and its call', { machine: 'stopped', stoppedSince: 3, call: call('unanswered') }, 'unanswered', 5],
    ['a stop whose call is parked', { machine: 'stopped', stoppedSince: 3, call: call('parked') }, 'parked', null],
    ['pinsetter.stopped alone', { machine: 'stopped', stoppedSince: 3 }, 'stopped', 3],
    ['pinsetter.restarted, cause missing', { call: call('unanswered', { returned: true }) }, 'cause-missing', null],
    ['equipment.faulted', { call: call('unanswered', { equipment: 'ball-lift' }) }, 'unanswered', 5],
    ['call.requested', { call: call('unanswered', { equipment: 'bumpers' }) }, 'unanswered', 5],
    ['acknowledged', { call: call('acknowledged') }, 'answered', 5],
    ['on lane', { call: call('on-lane') }, 'answered', 5],
    ['a danger', { call: call('unanswered', { safety: 'smoke' }) }, 'danger', 5],
    ['somebody in the machine', { call: call('on-lane'), mechanicIn: { by: 'Odell', since: 7 } }, 'mechanic-in', 7],
    ['out of service', { outOfService: { since: 1, reason: 'belt', by: 'Odell' }, machine: 'out-of-service' }, 'out-of-service', null],
    ['gateway silent', { unheard: true }, 'unheard', null],
  ])('%s', (_what, change, mark, since) => expect(markOf(lane(change))).toEqual({ mark, since }));
});

it('a clock in a machine stays short', () => expect([capClock(192_000), capClock(600_000), capClock(47 * 60_000), capClock(3 * 3_600_000), capClock(-4)]).toEqual(['3:12', '10 m', '47 m', '3 h', '0:00']));

describe('film and machine on sixty feet', () => {
  it('length is a share of 60 ft, unknown stays unknown', () => expect([filmShare(lane({ film })), filmShare(lane({ film: { ...film, lengthFt: null } })), filmShare(lane())]).toEqual([41 / 60, null, null]));
  it('a machine moves by its own pace and never says by itself that it is through', () => {
    const at = (now: number) => rigShare({ machine: 'm', run: '1', since: 1000, paceMs: 100 }, now);
    expect([at(900), at(1050), at(5000)]).toEqual([0, 0.5, 0.97]);
  });
});

it('deliveries alone flash nothing; people, calls and dressing do', () => {
  const before = changeSignature(lane({ film }));
  expect(changeSignature(lane({ film: { ...film, deliveries: 97, strength: 0.79 } }))).toBe(before);
  for (const change of [{ call: call('unanswered') }, { machine: 'off' as const }, { brokenOff: true }, { film: { ...film, at: 2 } }]) expect(changeSignature(lane({ film, ...change }))).not.toBe(before);
});
