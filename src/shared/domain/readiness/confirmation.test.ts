import { describe, expect, it } from 'vitest';
import { aCall, anEvening, aRun, aSession, MIN, readinessOf, undressed, WARM_UP } from '#tests/support/evening.ts';
import { judge, shownOf, type Worse } from './confirmation.ts';

const now = WARM_UP - 50 * MIN;
const shown = shownOf(aSession(), readinessOf(anEvening()));
const stopped = readinessOf(anEvening({ now, calls: [aCall(7)] }));

describe('a confirmation', () => {
  it('stands while nothing is worse', () => {
    expect(judge(shown, aSession(), readinessOf(anEvening({ now })), {}, now)).toEqual({ stands: true, worse: {} });
  });

  it('opens again when a check of a lane has been worse for more than a minute', () => {
    const first = judge(shown, aSession(), stopped, {}, now);
    expect(first).toEqual({ stands: true, worse: { '7/pinsetter': now } });
    const worse = (first as { worse: Worse }).worse;
    expect(judge(shown, aSession(), stopped, worse, now + MIN).stands).toBe(true);
    expect(judge(shown, aSession(), stopped, worse, now + MIN + 1)).toEqual({
      stands: false, because: { code: 'reopened.worse', params: { lane: 7, check: 'pinsetter', why: 'pinsetter.unanswered' } },
    });
  });

  it('a minute with a break doesn\'t count', () => {
    const healed = judge(shown, aSession(), readinessOf(anEvening({ now })), { '7/pinsetter': now - 59_000 }, now);
    expect(healed).toEqual({ stands: true, worse: {} });
  });

  it('to wait for a planned run isn\'t worse', () => {
    const waits = readinessOf(anEvening({ now, lanes: undressed(), runs: [aRun()] }));
    expect(judge(shown, aSession(), waits, {}, now)).toEqual({ stands: true, worse: {} });
  });

  it.each([
    [{ lanes: [3, 4, 5, 6] }, 'reopened.lanes'], [{ pattern: 'house' }, 'reopened.pattern'], [{ revision: 2 }, 'reopened.pattern'],
    [{ fresh: true }, 'reopened.pattern'], [{ startAt: WARM_UP + 40 * MIN }, 'reopened.time'], [{ warmUpAt: WARM_UP + MIN }, 'reopened.time'],
  ])('opens again at once when %o changes', (change, code) => {
    const session = aSession(change);
    expect(judge(shown, session, readinessOf(anEvening({ now }), session), {}, now)).toMatchObject({ stands: false, because: { code } });
  });
});
