import { describe, expect, it } from 'vitest';
import { downtime, leagueTimeLost } from './downtime.ts';

describe('downtime', () => {
  it('is the union of the stretches within opening hours, with the wanted part beside it', () => {
    const result = downtime({
      down: [{ from: 0, to: 30 }, { from: 20, to: 50 }, { from: 90, to: 130 }],
      opening: [{ from: 10, to: 100 }],
      wanted: [{ from: 40, to: 95 }],
    });
    expect(result).toEqual({ total: 50, wanted: 15, spans: [{ from: 10, to: 50 }, { from: 90, to: 100 }] });
  });

  it('is zero when nothing was down', () => {
    expect(downtime({ down: [], opening: [{ from: 0, to: 9 }], wanted: [] })).toEqual({ total: 0, wanted: 0, spans: [] });
  });
});

describe('leagueTimeLost', () => {
  const league = [{ from: 100, to: 200 }];

  it('counts a moment in which both lanes are down once', () => {
    expect(leagueTimeLost({ left: [{ from: 110, to: 130 }], right: [{ from: 120, to: 140 }], league, bowledOn: [] })).toBe(30);
  });

  it('counts nothing while they bowl on the other lane, and nothing outside the session', () => {
    expect(leagueTimeLost({ left: [{ from: 90, to: 130 }], right: [], league, bowledOn: [{ from: 105, to: 130 }] })).toBe(5);
    expect(leagueTimeLost({ left: [{ from: 0, to: 100 }], right: [{ from: 200, to: 300 }], league, bowledOn: [] })).toBe(0);
  });
});
