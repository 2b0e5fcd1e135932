import { describe, expect, it } from 'vitest';
import { changeWords, driftWords, laneList, laneWords, partWords, rateWords, trendWords, waitWords } from './numbers-words.ts';

describe('lanes', () => {
  it('are listed as people say them', () => {
    expect(laneList([9])).toBe('lane 9');
    expect(laneList([9, 14])).toBe('lanes 9 and 14');
    expect(laneList([3, 9, 14])).toBe('lanes 3, 9 and 14');
  });

  it('are hedged', () => {
    expect(laneWords({ code: 'lanes.watch', lanes: [9], byChance: 0.032, of: 32 })).toBe('Watch lane 9. The rest looks like chance.');
    expect(laneWords({ code: 'lanes.watch', lanes: [1, 2], byChance: 0.002, of: 2 })).toBe('Watch lanes 1 and 2.');
    expect(laneWords({ code: 'lanes.high-by-chance', lanes: [7], byChance: 1, of: 40 })).toBe(
      'No lane stands out. Lane 7 is a little high, but about 1 of 40 would be by chance alone.',
    );
    expect(laneWords({ code: 'lanes.high-by-chance', lanes: [7], byChance: 0.2, of: 8 })).toContain('fewer than 1 of 8');
    expect(laneWords({ code: 'lanes.several-high', lanes: [1, 2, 3], byChance: 0.8, of: 32 })).toBe(
      'Lanes 1, 2 and 3 are a little high: chance alone would bring about 1 of 32. None is far out; look again with more frames.',
    );
    expect(laneWords({ code: 'lanes.uneven', lanes: [1, 2, 3], of: 8 })).toMatch(/^3 lanes of 8 stand out/);
    expect(laneWords({ code: 'lanes.alike', of: 32 })).toBe('All 32 lanes lie within what chance allows. No lane is shown to be worse.');
    expect(laneWords({ code: 'lanes.no-frames' })).toContain('No frames');
    expect(laneWords({ code: 'lanes.no-stops' })).toContain('No machine stops');
  });
});

describe('changes', () => {
  it('give their range and claim no cause', () => {
    expect(changeWords({ code: 'change.fewer', ratio: 0.6, low: 0.451, high: 0.88 })).toBe(
      'Fewer stops per frame since the change: between 55 % fewer and 12 % fewer. That the change caused it isn’t shown by this alone.',
    );
    expect(changeWords({ code: 'change.more', ratio: null, low: 1.4, high: null })).toContain('at the least 40 % more');
    expect(changeWords({ code: 'change.not-shown', low: 0.6, high: 1.001, still: 3412 })).toBe(
      'Not shown yet: the difference could be chance (between 40 % fewer and no change). About 3,400 more frames would probably settle it.',
    );
    expect(changeWords({ code: 'change.not-shown', low: 0.6, high: 1.4, still: 0 })).toContain('probably smaller than that');
    expect(changeWords({ code: 'change.not-shown', low: 0.6, high: 1.4, still: null })).toContain('too few stops before');
    expect(changeWords({ code: 'change.no-frames' })).toContain('nothing to compare');
    expect(changeWords({ code: 'change.no-stops' })).toContain('nothing to compare');
  });
});

describe('trends, rates, parts, waits', () => {
  it('say what is known and no more', () => {
    expect(trendWords({ code: 'trend.too-few' })).toBe('Too few stops to see a trend.');
    expect(trendWords({ code: 'trend.steady', p: 0.4 })).toBe('No trend is shown. A slow one could still be hidden.');
    expect(trendWords({ code: 'trend.improving', p: 0.001 })).toContain('rarer');
    expect(trendWords({ code: 'trend.worsening', p: 0.001 })).toContain('more frequent');
    expect(driftWords({ code: 'drift.up', periods: 1 }, 'week')).toBe('Drifting up: above what chance allows for 1 week.');
    expect(driftWords({ code: 'drift.down', periods: 3 }, 'week')).toBe('Drifting down: below what chance allows for 3 weeks.');
    expect(driftWords({ code: 'drift.none' }, 'week')).toBe('No drift is shown.');
    expect(driftWords({ code: 'drift.no-data' }, 'week')).toContain('Nothing');
    expect(rateWords({ code: 'rate.value', rate: 4, low: 1.0899, high: 10.2416, level: 0.95 })).toBe('4.0 stops per thousand frames (95 % interval 1.1 to 10.2).');
    expect(rateWords({ code: 'rate.none', atMost: 3.689, frames: 1000 })).toBe('No stop in 1,000 frames: the true rate is probably below 3.7 per thousand.');
    expect(rateWords({ code: 'rate.no-frames' })).toContain('no rate');
    expect(rateWords({ code: 'rate.mixed' })).toContain('no common rate');
    expect(partWords({ code: 'part.too-few', failures: 1 }, 'frames')).toBe('1 failure so far: too few to advise an age.');
    expect(partWords({ code: 'part.replace-at', age: 41_234, saving: 0.234 }, 'frames')).toBe(
      'Replacing at about 41,000 frames is estimated to cost 23 % less than running to failure.',
    );
    expect(partWords({ code: 'part.no-wear-shown' }, 'frames')).toContain('don’t show wear');
    expect(partWords({ code: 'part.run-to-failure' }, 'frames')).toContain('running to failure');
    expect(waitWords({ code: 'wait.met', share: 0.93, wanted: 0.9, minutes: 3, mechanics: 2 })).toBe('2 mechanics: about 93 % of calls answered within 3 minutes, as wanted.');
    expect(waitWords({ code: 'wait.missed', share: 0.8, wanted: 0.9, minutes: 1, mechanics: 1 })).toBe('1 mechanic: about 80 % of calls answered within 1 minute, less than the 90 % wanted.');
    expect(waitWords({ code: 'wait.missed', share: 0.899, wanted: 0.9, minutes: 3, mechanics: 1 })).toBe('1 mechanic: just under the 90 % of calls answered within 3 minutes that are wanted.');
    expect(waitWords({ code: 'wait.overloaded', mechanics: 1 })).toContain('More calls than 1 mechanic can answer');
  });
});
