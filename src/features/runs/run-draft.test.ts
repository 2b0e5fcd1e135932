import { describe, expect, it } from 'vitest';
import { businessDay } from '#shared/domain/business-day.ts';
import { EMPTY_RUN, planOf, recordOf } from './run-draft.ts';

const night = { day: businessDay('2026-05-14', 'Europe/London'), zone: 'Europe/London' };
/** Clocks go forward in the small hours that end this night: 01:00 to 02:00 on 29 March 2026 is missing. */
const spring = { day: businessDay('2026-03-28', 'Europe/London'), zone: 'Europe/London' };
const draft = { ...EMPTY_RUN, machine: 'heron', pattern: 'owls', lanes: '25–28', start: '19:40', end: '19:52' };

describe('a run as typed', () => {
  it('is planned at the wall time of this night; small hours are tomorrow’s date', () => {
    expect(planOf(draft, night)).toEqual({ ok: true, body: { machine: 'heron', pattern: 'owls', lanes: [25, 26, 27, 28], startAt: Date.parse('2026-05-14T18:40:00Z') } });
    expect(planOf({ ...draft, start: '00:30' }, night)).toMatchObject({ body: { startAt: Date.parse('2026-05-14T23:30:00Z') } });
  });

  it('is recorded lane by lane', () => {
    expect(recordOf({ ...draft, skipped: '26', broken: '28' }, night)).toMatchObject({ ok: true, body: { startedAt: Date.parse('2026-05-14T18:40:00Z'), finishedAt: Date.parse('2026-05-14T18:52:00Z'), lanes: [
      { lane: 25, outcome: 'dressed' }, { lane: 26, outcome: 'skipped' }, { lane: 27, outcome: 'dressed' }, { lane: 28, outcome: 'broken-off' },
    ] } });
  });

  it('says field by field what is wrong', () => {
    expect(planOf(EMPTY_RUN, night)).toEqual({ ok: false, faults: { machine: 'needed', pattern: 'needed', lanes: 'needed', start: 'needed' } });
    expect(planOf({ ...draft, lanes: 'all', start: '25:00' }, night)).toEqual({ ok: false, faults: { lanes: 'lanes', start: 'time' } });
    expect(recordOf({ ...draft, skipped: '3', broken: 'x', end: '' }, night)).toEqual({ ok: false, faults: { skipped: 'not-of-run', broken: 'lanes', end: 'needed' } });
  });

  it('a start in the missing hour doesn’t exist', () => {
    expect(planOf({ ...draft, start: '01:30' }, spring)).toEqual({ ok: false, faults: { start: 'missing-hour' } });
    expect(planOf({ ...draft, start: '02:30' }, spring)).toMatchObject({ body: { startAt: Date.parse('2026-03-29T01:30:00Z') } });
  });
});
