import { describe, expect, it } from 'vitest';
import { aCall, anEvening, seenFrom } from '#tests/support/evening.ts';
import { checkOtherEquipment } from './other-equipment.ts';

const on = (lane: number, ...calls: ReturnType<typeof aCall>[]) => checkOtherEquipment(seenFrom(lane, anEvening({ calls })));

describe('other equipment of lane and pair', () => {
  it('a ball return holds both lanes of its pair and no other', () => {
    const call = aCall(7, { equipment: 'ball-return' });
    expect([5, 7, 8].map((lane) => on(lane, call).verdict)).toEqual(['ok', 'holds', 'holds']);
  });
  it('a foul unit holds its own lane', () => {
    const call = aCall(7, { equipment: 'foul-unit' });
    expect([on(7, call).verdict, on(8, call).verdict]).toEqual(['holds', 'ok']);
    expect(on(7, call)).toMatchObject({ code: 'other.unanswered', params: { equipment: 'foul-unit' } });
  });
  it('masking and a power dip of the house only put it at risk', () => {
    expect(on(7, aCall(7, { equipment: 'masking' })).verdict).toBe('at-risk');
    expect(on(5, aCall(1, { equipment: 'power' })).verdict).toBe('at-risk');
  });
  it('a danger holds the pair, whatever it is called on, and outweighs the rest', () => {
    const danger = aCall(7, { equipment: 'approach', safety: 'wet-approach' });
    expect(on(8, aCall(8, { equipment: 'masking' }), danger)).toMatchObject({ verdict: 'holds', code: 'other.danger' });
  });
  it('restored equipment doesn\'t hold, and the pinsetter is another check', () => {
    expect(on(7, aCall(7, { equipment: 'foul-unit', returnedAt: 1 })).verdict).toBe('ok');
    expect(on(7, aCall(7)).verdict).toBe('ok');
  });
});
