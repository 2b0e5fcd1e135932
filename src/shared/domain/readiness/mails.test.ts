import { describe, expect, it } from 'vitest';
import { MIN, WARM_UP } from '#tests/support/evening.ts';
import { mailDue } from './mails.ts';

const none = { held60: false, held30: false, ready: false };
const at = (minutes: number) => WARM_UP - minutes * MIN;

describe('mails about a session', () => {
  it('only held is mailed, at 60 and at 30 minutes', () => {
    expect([61, 60, 45, 31].map((m) => mailDue('held', WARM_UP, none, at(m)))).toEqual([null, 'held-60', 'held-60', 'held-60']);
    expect([30, 5].map((m) => mailDue('held', WARM_UP, { ...none, held60: true }, at(m)))).toEqual(['held-30', 'held-30']);
    for (const verdict of ['planned', 'at-risk', 'ready'] as const) expect(mailDue(verdict, WARM_UP, none, at(60))).toBeNull();
  });

  it('each once', () => {
    expect(mailDue('held', WARM_UP, { ...none, held60: true }, at(45))).toBeNull();
    expect(mailDue('held', WARM_UP, { ...none, held60: true, held30: true }, at(10))).toBeNull();
  });

  it('one when ready is reached after people were told that it was held', () => {
    const told = { ...none, held60: true };
    expect(mailDue('ready', WARM_UP, told, at(40))).toBe('ready');
    expect(mailDue('planned', WARM_UP, told, at(40))).toBeNull();
    expect(mailDue('ready', WARM_UP, { ...told, ready: true }, at(20))).toBeNull();
  });

  it('nothing from warm-up on', () => {
    expect(mailDue('held', WARM_UP, none, WARM_UP)).toBeNull();
    expect(mailDue('ready', WARM_UP, { ...none, held30: true }, WARM_UP)).toBeNull();
  });
});
