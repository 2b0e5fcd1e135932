import { describe, expect, it } from 'vitest';
import { ISOLATION_STEPS, isolationRecorded, mayRecord, nothingRecorded, RELEASE_STEPS, releaseRecorded } from './lockout-steps.ts';
import { LAST_LOCKOUT_STEP } from './work.ts';

const at = (...codes: string[]): Record<string, number> => Object.fromEntries(codes.map((code, i) => [code, i + 1]));
const before = ISOLATION_STEPS.map((step) => step.code);

describe('lockout record', () => {
  it('takes every step in the order of the list', () => {
    const order = [...before, ...RELEASE_STEPS];
    order.forEach((step, i) => expect(mayRecord(step, true, at(...order.slice(0, i)))).toEqual({ ok: true }));
  });

  it('lets the two isolators come in either order, but the lock only after both', () => {
    const stopped = ['told-desk', 'machine-stopped', 'neighbour-balls'];
    expect(mayRecord('lift-isolated', true, at(...stopped))).toEqual({ ok: true });
    expect(mayRecord('lock-and-tag', true, at(...stopped, 'machine-isolated'))).toEqual({
      ok: false, code: 'lockout.step-out-of-order', waitsFor: 'lift-isolated',
    });
  });

  it('refuses to try the start before stored energy is released', () => {
    const locked = before.slice(0, before.indexOf('energy-released'));
    expect(mayRecord('try', true, at(...locked))).toMatchObject({ code: 'lockout.step-out-of-order', waitsFor: 'energy-released' });
  });

  it('takes the own lock off last', () => {
    expect(mayRecord('own-lock-off', true, at(...before, 'tools-out', 'guards-on'))).toMatchObject({ waitsFor: 'people-clear' });
  });

  it('takes a step back only while nothing rests on it', () => {
    expect(mayRecord('told-desk', false, at('told-desk'))).toEqual({ ok: true });
    expect(mayRecord('told-desk', false, at('told-desk', 'machine-stopped'))).toMatchObject({ waitsFor: 'machine-stopped' });
    expect(mayRecord('tools-out', false, at(...before, 'tools-out', 'guards-on'))).toMatchObject({ waitsFor: 'guards-on' });
  });

  it('holds the list before still once release has begun, and allows release half way', () => {
    expect(mayRecord('tools-out', true, at('told-desk'))).toEqual({ ok: true });
    expect(mayRecord('machine-stopped', true, at('told-desk', 'tools-out'))).toMatchObject({ waitsFor: 'tools-out' });
  });

  it('ends with the step from which the fold says that somebody is in the machine', () => {
    expect(ISOLATION_STEPS.at(-1)?.code).toBe(LAST_LOCKOUT_STEP);
  });

  it('knows no other steps', () => {
    expect(mayRecord('coffee', true, {})).toEqual({ ok: false, code: 'lockout.step-unknown' });
    expect(mayRecord('toString', true, {})).toEqual({ ok: false, code: 'lockout.step-unknown' });
  });

  it('says when somebody is recorded in the machine, and when it may run again', () => {
    expect(isolationRecorded(at(...before.slice(0, -1)))).toBe(false);
    expect(isolationRecorded(at(...before))).toBe(true);
    expect(releaseRecorded(at(...before, ...RELEASE_STEPS.slice(0, -1)))).toBe(false);
    expect(releaseRecorded(at(...before, ...RELEASE_STEPS))).toBe(true);
    expect(nothingRecorded({})).toBe(true);
    expect(nothingRecorded(at('told-desk'))).toBe(false);
  });
});
