import { describe, expect, it } from 'vitest';
import { cannotLayText, patternProblemText, planReason, proofText } from './plan.ts';

const clock = (at: number): string => `20:${String(at).padStart(2, '0')}`;
const criteria = { sessionsLate: 1, latenessMs: 600_000, freshnessLostMs: 0, travelMs: 0, changes: 0 };
const all = { sessionsLate: true, lateness: true, freshness: true, travel: true };

describe('wording of plans and patterns', () => {
  it('says why, where and until when', () => {
    expect(planReason({ code: 'late.lanes-free-at', params: { block: 'b', lane: 7, at: 38 } }, clock)).toBe('Lane 7 and its pair are free at 20:38.');
    expect(planReason({ code: 'block.exceeds-store', params: { machine: 'M1', store: 'tankA', need: 120_000, holds: 90_000 } }, clock)).toBe('Machine M1 holds 90 mL of conditioner A, these lanes need 120 mL: plan fewer lanes in one go.');
    expect(cannotLayText({ code: 'machine.product-not-carried', pass: 3, params: { product: 'B' } })).toBe('Pass 3: it carries no product B.');
    expect(cannotLayText({ code: 'machine.cannot-oil', params: {} })).toBe('This machine only cleans.');
    expect(patternProblemText({ code: 'pattern.length-out-of-range', place: { field: 'lengthFt' }, params: { min: 10, max: 60 } })).toBe('The length must be between 10 and 60 ft, in tenths.');
  });

  it('claims no more than is proven', () => {
    const bound = { sessionsLate: 1, latenessMs: 360_000 };
    expect(proofText({ method: 'exact', proven: all, criteria, bound })).toBe('Proven best with these blocks');
    expect(proofText({ method: 'exact', proven: { ...all, freshness: false, travel: false }, criteria, bound })).toBe('Proven best in sessions late and lateness');
    expect(proofText({ method: 'heuristic', proven: { ...all, lateness: false }, criteria, bound })).toBe('Within 4 min of the best possible');
    expect(proofText({ method: 'heuristic', proven: { ...all, sessionsLate: false }, criteria, bound: { ...bound, sessionsLate: 0 } })).toBe('At best 0 sessions late; this plan has 1 late session');
  });
});
