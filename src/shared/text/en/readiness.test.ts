import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { aCall, anEvening, aRun, aSession, MIN, readinessOf, WARM_UP } from '#tests/support/evening.ts';
import { outstanding } from '../../domain/readiness/session.ts';
import { barSentence, becauseSentence, checkSentence, knowsCheckCode, sessionSentence } from './readiness.ts';

const clock = (at: number): string => new Date(at).toISOString().slice(11, 16);
const spoken = (around: Parameters<typeof readinessOf>[0]) => {
  const { verdict, lanes } = readinessOf(around);
  return sessionSentence(verdict, aSession().lanes, outstanding({ lanes }), clock);
};

describe('sentences of readiness', () => {
  it('says what is ready, what the plan settles, and what holds, in that order', () => {
    const call = aCall(7, { status: 'on-lane', lockout: { by: { kind: 'user', id: 'm', name: 'Odell' }, begunAt: 1, steps: {}, inMachineSince: 2, releasedAt: null, alarmAt: null } });
    const around = anEvening({ lanes: { 5: { dressed: null }, 6: { dressed: null }, 7: { dressed: null } }, runs: [aRun({ lanes: [5, 6, 7] })], calls: [call] });
    expect(spoken(around)).toEqual({ lead: 'Not ready yet.', rest: 'One lane is ready; lanes 5 and 6 will be at 19:39. Lane 7 waits for the mechanic and must be dressed by 20:01.' });
    const { verdict, lanes } = readinessOf(around);
    expect(barSentence(verdict, [5, 6, 7, 8], outstanding({ lanes }), clock)).toBe('Lane 7 waits for the mechanic and must be dressed by 20:01.');
  });

  it('is short when all is well', () => expect(spoken(anEvening())).toEqual({ lead: 'Ready.', rest: 'All four lanes are as asked.' }));

  it('speaks of one lane and of several', () => {
    const check = { code: 'pattern.run-late', params: { doneAt: WARM_UP + MIN } };
    expect(checkSentence([5], check, clock)).toBe('Lane 5 will be dressed at 20:06, after warm-up.');
    expect(checkSentence([5, 6, 7], { code: 'bumpers.up', params: {} }, clock)).toBe('Lanes 5–7 still have the bumpers up.');
    expect(checkSentence([5], { code: 'bumpers.up', params: {} }, clock)).toBe('Lane 5 still has the bumpers up.');
  });

  it('says why a confirmation is open again', () => {
    expect(becauseSentence({ code: 'reopened.worse', params: { lane: 7, check: 'pinsetter', why: 'x' } }, clock)).toBe('Lane 7 got worse: pinsetter and its calls.');
    expect(becauseSentence({ code: 'reopened.lanes', params: { before: '5,6,7,8', after: '5,6,9,10' } }, clock)).toBe('Its lanes were changed from 5–8 to 5–6, 9–10.');
  });

  it('has words for every code that a check gives', () => {
    const files = ['bumpers', 'by-run', 'certificate', 'film', 'lane-free', 'machine', 'other-equipment', 'pattern', 'pinsetter', 'repeated-stops', 'run-complete'];
    const codes = files.flatMap((file) => {
      const source = readFileSync(new URL(`../../domain/readiness/checks/${file}.ts`, import.meta.url), 'utf8');
      return [...source.matchAll(/'((?:pattern|run|machine|lane|pinsetter|stops|other|bumpers|certificate)\.[a-z-]+)'/g)].map((match) => match[1] ?? '');
    });
    const staged = ['unanswered', 'coming', 'on-lane', 'mechanic-in', 'parked', 'out-of-service'].flatMap((stage) => [`pinsetter.${stage}`, `other.${stage}`]);
    expect(codes.length).toBeGreaterThan(30);
    expect([...new Set([...codes, ...staged])].filter((code) => !knowsCheckCode(code))).toEqual([]);
  });
});
