import { expect, it } from 'vitest';
import { interior } from './event-series.ts';

it('drops the last event of a failure-terminated watch', () => {
  expect(interior({ times: [1, 4, 9], end: 9, termination: 'failure' })).toEqual({ times: [1, 4], end: 9 });
  expect(interior({ times: [1, 4, 9], end: 12 })).toEqual({ times: [1, 4, 9], end: 12 });
});

it('refuses times out of order, past the end, or an end that is not the last event', () => {
  expect(() => interior({ times: [4, 1], end: 9 })).toThrow('order');
  expect(() => interior({ times: [4, 10], end: 9 })).toThrow('after the end');
  expect(() => interior({ times: [4, 8], end: 9, termination: 'failure' })).toThrow('last event');
  expect(() => interior({ times: [], end: 0 })).toThrow('end');
});
