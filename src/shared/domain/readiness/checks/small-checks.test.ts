import { describe, expect, it } from 'vitest';
import { aCall, anEvening, aRun, aSession, aUse, HOUR, MIN, seenFrom, undressed, WARM_UP } from '#tests/support/evening.ts';
import { checkBumpers } from './bumpers.ts';
import { checkCertificate } from './certificate.ts';
import { checkMachine } from './machine.ts';
import { checkRepeatedStops } from './repeated-stops.ts';
import { checkRunComplete } from './run-complete.ts';

describe('run complete', () => {
  const broken = { 5: { brokenOff: { at: WARM_UP - HOUR, machine: 'M1', run: '117' }, dressed: null } };
  it('is complete where no machine broke off', () => expect(checkRunComplete(seenFrom(5, anEvening())).verdict).toBe('ok'));
  it('holds a lane on which it broke off, until a run that ends in time is planned', () => {
    expect(checkRunComplete(seenFrom(5, anEvening({ lanes: broken })))).toMatchObject({ verdict: 'holds', code: 'run.broken-off' });
    expect(checkRunComplete(seenFrom(5, anEvening({ lanes: broken, runs: [aRun()] })))).toMatchObject({ verdict: 'ok', waits: true });
  });
});

describe('machine of the planned run', () => {
  const around = (change: object = {}) => anEvening({ lanes: undressed(), runs: [aRun()], ...change });
  const levels = (level: object) => {
    const evening = around();
    return { ...evening, runs: { ...evening.runs, levels: { M1: { machine: 'M1', at: 0, tankAUl: null, tankBUl: null, cleanerUl: null, wasteUl: null, batteryPct: null, ...level } } } };
  };
  it('isn\'t asked where the lane needs no run', () => expect(checkMachine(seenFrom(5, anEvening()))).toMatchObject({ code: 'machine.not-needed' }));
  it('is fine when nothing speaks against it', () => expect(checkMachine(seenFrom(5, around()))).toMatchObject({ code: 'machine.fine' }));
  it('tanks must last to this lane: 3 × 25 mL for the third', () => {
    expect(checkMachine(seenFrom(7, levels({ tankAUl: 75_000 }))).verdict).toBe('ok');
    expect(checkMachine(seenFrom(7, levels({ tankAUl: 74_999 })))).toMatchObject({ verdict: 'at-risk', code: 'machine.tank-short' });
    expect(checkMachine(seenFrom(6, levels({ tankAUl: 74_999 }))).verdict).toBe('ok');
  });
  it('a low battery and an open call for a machine put it at risk', () => {
    expect(checkMachine(seenFrom(5, levels({ batteryPct: 19 })))).toMatchObject({ code: 'machine.battery-low' });
    expect(checkMachine(seenFrom(5, levels({ batteryPct: 20 }))).verdict).toBe('ok');
    expect(checkMachine(seenFrom(5, around({ calls: [aCall(1, { equipment: 'lane-machine' })] })))).toMatchObject({ code: 'machine.call-open' });
  });
  it('no word for three lanes\' time: it stands', () => {
    const under = (lastAt: number) => checkMachine(seenFrom(5, around({ runs: [aRun({ status: 'under-way', startedAt: WARM_UP - 70 * MIN, lastAt })] })));
    expect(under(WARM_UP - 67 * MIN)).toMatchObject({ verdict: 'at-risk', code: 'machine.stands' });
    expect(under(WARM_UP - 66 * MIN)).toMatchObject({ code: 'machine.fine' });
  });
});

describe('repeated stops', () => {
  const lane = (stopMarks: number[], hears = { deliveries: true, frames: true, stops: true }) =>
    checkRepeatedStops(seenFrom(5, anEvening({ lanes: { 5: { framesEver: 1000, stopMarks, hears } } })));
  it('three in the last 200 frames put it at risk', () => {
    expect(lane([800, 900, 1000])).toMatchObject({ verdict: 'at-risk', params: { stops: 3, frames: 200 } });
    expect(lane([799, 900, 1000]).verdict).toBe('ok');
  });
  it('says nothing where no frames are heard', () => expect(lane([1000, 1000, 1000], { deliveries: true, frames: false, stops: true }).verdict).toBe('ok'));
});

describe('bumpers', () => {
  it('up is at risk, while those people are still there it waits, and a party may have them', () => {
    expect(checkBumpers(seenFrom(5, anEvening())).verdict).toBe('ok');
    expect(checkBumpers(seenFrom(5, anEvening({ lanes: { 5: { bumpers: true } } }))).verdict).toBe('at-risk');
    expect(checkBumpers(seenFrom(5, anEvening({ lanes: { 5: { bumpers: true, use: aUse({ kind: 'party' }) } } })))).toMatchObject({ verdict: 'ok', waits: true });
    expect(checkBumpers(seenFrom(5, anEvening({ lanes: { 5: { bumpers: true } } }), aSession({ kind: 'party' }))).verdict).toBe('ok');
  });
});

describe('certificate', () => {
  const sanctioned = aSession({ sanctioned: true });
  const until = (certifiedUntil: string | null, session = sanctioned) =>
    checkCertificate(seenFrom(5, anEvening(), session).facts ? { ...seenFrom(5, anEvening(), session), facts: { lane: 5, family: 'free-fall', certifiedUntil } } : seenFrom(5, anEvening(), session));
  it('is valid to the end of its date, and only sanctioned play asks for it', () => {
    expect(until('2026-05-14')).toMatchObject({ verdict: 'ok', code: 'certificate.valid' });
    expect(until('2026-05-13')).toMatchObject({ verdict: 'holds', code: 'certificate.expired' });
    expect(until(null)).toMatchObject({ verdict: 'holds', code: 'certificate.none' });
    expect(until(null, aSession()).verdict).toBe('ok');
  });
  it('never mixes free-fall with string', () => {
    const mixed = { ...seenFrom(5, anEvening(), sanctioned), families: ['free-fall', 'string'] as const };
    expect(checkCertificate(mixed)).toMatchObject({ verdict: 'holds', code: 'certificate.families-mixed' });
  });
});
