import { expect, it } from 'vitest';
import { demandAmount, demandCount, demandOpenUnit, demandPositive, demandSameLength } from './demand.ts';

it('names the argument that can not be', () => {
  expect(() => demandCount('stops', 1.5)).toThrow('stops must be a whole number of 0 or more, got 1.5');
  expect(() => demandAmount('frames', Number.POSITIVE_INFINITY)).toThrow('frames');
  expect(() => demandPositive('end', 0)).toThrow('end');
  expect(() => demandOpenUnit('level', 1)).toThrow('level');
  expect(() => demandSameLength('both', [1], [])).toThrow('both');
});

it('lets the borders through', () => {
  demandCount('stops', 0);
  demandAmount('frames', 0);
  demandPositive('end', Number.MIN_VALUE);
  demandOpenUnit('level', 0.5);
  demandSameLength('both', [], []);
});
