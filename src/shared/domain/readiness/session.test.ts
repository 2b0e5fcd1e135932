import { describe, expect, it } from 'vitest';
import { aCall, anEvening, aRun, aSession, HOUR, MIN, readinessOf, undressed, WARM_UP } from '#tests/support/evening.ts';
import { isFrozen, moments, outstanding } from './session.ts';
import { DEFAULT_READINESS } from './settings.ts';

describe('readiness of a session', () => {
  it('ready: all lanes, all checks', () => {
    const ready = readinessOf(anEvening());
    expect(ready.verdict).toBe('ready');
    expect(ready.lanes.map((lane) => [lane.lane, lane.mark])).toEqual([[5, 'ok'], [6, 'ok'], [7, 'ok'], [8, 'ok']]);
  });

  it('planned: occupied and undressed an hour before, with a run and an end in time', () => {
    const early = aSession({ id: 'early', name: 'Early', warmUpAt: WARM_UP - 3 * HOUR, startAt: WARM_UP - 3 * HOUR, endAt: WARM_UP - 45 * MIN, format: null });
    const planned = readinessOf(anEvening({ lanes: undressed(), runs: [aRun()], sessions: [aSession(), early] }));
    expect(planned.verdict).toBe('planned');
  });

  it('held: the same when the early session ends too late for the run', () => {
    const early = aSession({ id: 'early', name: 'Early', warmUpAt: WARM_UP - 3 * HOUR, startAt: WARM_UP - 3 * HOUR, endAt: WARM_UP - 14 * MIN, format: null });
    const held = readinessOf(anEvening({ lanes: undressed(), runs: [aRun()], sessions: [aSession(), early] }));
    expect(held.verdict).toBe('held');
    expect(outstanding(held)[0]?.check.code).toBe('pattern.run-late');
  });

  it('its worst lane: one stop holds the session, one bumper puts it at risk', () => {
    const held = readinessOf(anEvening({ calls: [aCall(7)] }));
    expect([held.verdict, held.lanes.map((lane) => lane.mark)]).toEqual(['held', ['ok', 'ok', 'holds', 'ok']]);
    expect(readinessOf(anEvening({ lanes: { 6: { bumpers: true } } })).verdict).toBe('at-risk');
  });

  it('the centre says what holds, warns, or is ignored', () => {
    const weigh = (pinsetter: 'holds' | 'warns' | 'ignored') =>
      readinessOf(anEvening({ calls: [aCall(7)], settings: { ...DEFAULT_READINESS, weights: { ...DEFAULT_READINESS.weights, pinsetter } } })).verdict;
    expect([weigh('holds'), weigh('warns'), weigh('ignored')]).toEqual(['held', 'at-risk', 'ready']);
  });

  it('names what is outstanding once for all lanes that share it, worst first', () => {
    const held = readinessOf(anEvening({ lanes: { 7: { dressed: null }, 8: { dressed: null } }, runs: [aRun({ lanes: [7, 8] })], calls: [aCall(5)] }));
    expect(outstanding(held).map(({ lanes, check }) => [lanes, check.code])).toEqual([[[5], 'pinsetter.unanswered'], [[7, 8], 'pattern.run-planned']]);
    expect(moments(held)).toEqual([
      { at: WARM_UP - 26 * MIN, kind: 'settles', lanes: [7, 8], mark: 'waits' },
      { at: WARM_UP, kind: 'latest', lanes: [5], mark: 'holds' },
    ]);
  });

  it('is frozen from warm-up on', () => {
    expect([isFrozen(aSession(), WARM_UP - 1), isFrozen(aSession(), WARM_UP)]).toEqual([false, true]);
  });
});
