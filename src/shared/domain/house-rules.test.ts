import { describe, expect, it } from 'vitest';
import { DEFAULT_ESCALATION } from './calls/escalation.ts';
import { ageingBy, escalationBy, type HouseRules, readinessBy, rulesFaults, USUAL_RULES } from './house-rules.ts';
import { DEFAULT_READINESS } from './readiness/settings.ts';
import { DEFAULT_AGEING } from './runs/ageing.ts';

describe('rules of a house', () => {
  it('are common practice until the centre says otherwise', () => {
    expect(escalationBy(USUAL_RULES)).toEqual(DEFAULT_ESCALATION);
    expect(ageingBy(USUAL_RULES)).toEqual(DEFAULT_AGEING);
    expect(readinessBy(USUAL_RULES, DEFAULT_READINESS.weights)).toEqual(DEFAULT_READINESS);
    expect(rulesFaults(USUAL_RULES)).toEqual([]);
  });

  it.each<[Partial<HouseRules>, keyof HouseRules, string]>([
    [{ otherMechanicMin: 7 }, 'deskMin', 'rules.desk-before-mechanic'], [{ managerMin: 5 }, 'managerMin', 'rules.manager-before-desk'],
    [{ dressMarginMin: 120 }, 'planLeadMin', 'rules.lead-within-margin'], [{ freshDeliveries: 500 }, 'wornDeliveries', 'rules.worn-within-fresh'],
    [{ freshHours: 24 }, 'wornHours', 'rules.worn-within-fresh'],
  ])('%o contradict the others', (change, field, code) => {
    expect(rulesFaults({ ...USUAL_RULES, ...change })).toEqual([{ field, code }]);
  });
});
