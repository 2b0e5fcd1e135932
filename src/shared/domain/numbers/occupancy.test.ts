import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addUse, laneUse, occupancy, useByQuarterHour, type LaneDay } from './occupancy.ts';
import { total } from './spans.ts';

const HOUR = 3_600_000;
const idleLane: LaneDay = { outOfService: [], serviced: [], league: [], paid: [], unpaid: [] };
const opening = [{ from: 0, to: 10 * HOUR }];

describe('laneUse', () => {
  it('puts each moment in one class, out of service first', () => {
    const use = laneUse(
      {
        outOfService: [{ from: 4 * HOUR, to: 5 * HOUR }],
        serviced: [{ from: 0, to: HOUR }],
        league: [{ from: 2 * HOUR, to: 6 * HOUR }],
        paid: [{ from: 5 * HOUR, to: 8 * HOUR }],
        unpaid: [{ from: 7 * HOUR, to: 9 * HOUR }],
      },
      opening,
    );
    expect(use).toEqual({ league: 3 * HOUR, paid: 2 * HOUR, unpaid: HOUR, blocked: 2 * HOUR, idle: 2 * HOUR, outOfService: HOUR, open: 10 * HOUR });
    expect(occupancy(use)).toEqual({ ofAll: 0.6, ofInService: 6 / 9 });
  });

  it('is missing for a closed day, and has no share in service for a lane that never was', () => {
    expect(occupancy(laneUse(idleLane, []))).toEqual({ value: null, reason: 'not-open' });
    expect(occupancy(laneUse({ ...idleLane, outOfService: opening }, opening))).toEqual({ ofAll: 0, ofInService: null });
  });

  it('adds up to opening time whatever overlaps', () => {
    const list = fc.array(fc.record({ from: fc.integer({ min: -5, max: 40 }), to: fc.integer({ min: -5, max: 40 }) }), { maxLength: 5 });
    fc.assert(
      fc.property(fc.record({ outOfService: list, serviced: list, league: list, paid: list, unpaid: list }), list, (lane, hours) => {
        const use = laneUse(lane, hours);
        expect(use.open).toBe(total(hours));
        expect(use.league + use.paid + use.unpaid + use.blocked + use.idle).toBe(use.open);
        expect(use.outOfService).toBeLessThanOrEqual(use.blocked);
      }),
    );
  });
});

describe('useByQuarterHour', () => {
  it.each([
    [23, 92],
    [24, 96],
    [25, 100],
  ])('a day of %i hours has %i quarter hours that add up to the day', (hours, quarters) => {
    const from = Date.UTC(2027, 2, 13, 10);
    const day = { from, to: from + hours * HOUR };
    const lanes = [
      { ...idleLane, paid: [{ from: from + HOUR / 3, to: from + 5 * HOUR }] },
      { ...idleLane, outOfService: [day], league: [day] },
    ];
    const rows = useByQuarterHour(lanes, [day], day);
    expect(rows).toHaveLength(quarters);
    expect(addUse(rows.map((row) => row.use))).toEqual(addUse(lanes.map((lane) => laneUse(lane, [day]))));
    expect(rows[1]!.use.paid).toBe(10 * 60_000);
  });
});
