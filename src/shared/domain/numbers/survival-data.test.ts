import { expect, it } from 'vitest';
import { riskTable } from './survival-data.ts';

it('counts who is at risk at each time, the censored ones still at theirs', () => {
  const lives = [
    { time: 5, failed: true },
    { time: 3, failed: false },
    { time: 3, failed: true },
    { time: 5, failed: true },
  ];
  expect(riskTable(lives)).toEqual([
    { time: 3, atRisk: 4, failures: 1, censored: 1 },
    { time: 5, atRisk: 2, failures: 2, censored: 0 },
  ]);
  expect(() => riskTable([{ time: -1, failed: true }])).toThrow(RangeError);
});
