import { describe, expect, it } from 'vitest';
import { settle, typeDigit } from './lane-typing.ts';

describe('typing a lane of a house of 32', () => {
  it('selects at once where no longer number exists', () => {
    expect(typeDigit('', '9', 32)).toEqual({ digits: '9', select: 9 });
    expect(typeDigit('3', '1', 32)).toEqual({ digits: '31', select: 31 });
  });
  it('waits where one does', () => {
    expect(typeDigit('', '1', 32)).toEqual({ digits: '1', select: null });
    expect(settle('1', 32)).toBe(1);
  });
  it('a digit that leads to no lane begins anew', () => expect(typeDigit('3', '9', 32)).toEqual({ digits: '9', select: 9 }));
  it('a zero alone is nothing, a zero after a digit counts', () => {
    expect(typeDigit('', '0', 32)).toEqual({ digits: '', select: null });
    expect(typeDigit('3', '0', 32)).toEqual({ digits: '30', select: 30 });
  });
  it('a number beyond a small house is shown and selects nothing', () => {
    expect(typeDigit('', '9', 8)).toEqual({ digits: '9', select: null });
    expect(settle('9', 8)).toBeNull();
  });
});
