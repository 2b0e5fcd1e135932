import { DEFAULT_ESCALATION, type EscalationRules } from './calls/escalation.ts';
import { DEFAULT_READINESS, type ReadinessSettings } from './readiness/settings.ts';
import { type AgeingSettings, DEFAULT_AGEING } from './runs/ageing.ts';

/** What a centre decides for itself, in whole minutes, hours, deliveries and per cent. */
export interface HouseRules {
  /** A call unanswered for so long is the other mechanic's, then the desk's, then the manager's, min. */
  otherMechanicMin: number;
  deskMin: number;
  managerMin: number;
  /** Lanes are dressed this long before warm-up, min; until `planLeadMin` before it a lane that nobody plans only warns. */
  dressMarginMin: number;
  planLeadMin: number;
  lowBatteryPct: number;
  /** Fresh: at most so many deliveries and hours. Worn: more than so many. */
  freshDeliveries: number;
  freshHours: number;
  wornDeliveries: number;
  wornHours: number;
  /** Deliveries by others that a league asking for fresh lanes still accepts. */
  freshTolerance: number;
}

const MINUTE = 60_000;

/** Common practice, until the centre says otherwise. */
export const USUAL_RULES: HouseRules = {
  otherMechanicMin: DEFAULT_ESCALATION.otherMechanicMs / MINUTE, deskMin: DEFAULT_ESCALATION.deskMs / MINUTE, managerMin: DEFAULT_ESCALATION.managerMs / MINUTE,
  dressMarginMin: DEFAULT_READINESS.dressMarginMs / MINUTE, planLeadMin: DEFAULT_READINESS.planLeadMs / MINUTE, lowBatteryPct: DEFAULT_READINESS.lowBatteryPct,
  ...DEFAULT_AGEING,
};

export const escalationBy = (rules: HouseRules): EscalationRules =>
  ({ otherMechanicMs: rules.otherMechanicMin * MINUTE, deskMs: rules.deskMin * MINUTE, managerMs: rules.managerMin * MINUTE });

export const ageingBy = ({ freshDeliveries, freshHours, wornDeliveries, wornHours, freshTolerance }: HouseRules): AgeingSettings =>
  ({ freshDeliveries, freshHours, wornDeliveries, wornHours, freshTolerance });

export const readinessBy = (rules: HouseRules, weights: ReadinessSettings['weights']): ReadinessSettings => ({
  ...DEFAULT_READINESS, weights, dressMarginMs: rules.dressMarginMin * MINUTE, planLeadMs: rules.planLeadMin * MINUTE, lowBatteryPct: rules.lowBatteryPct, ageing: ageingBy(rules),
});

export type RulesFault = 'rules.desk-before-mechanic' | 'rules.manager-before-desk' | 'rules.lead-within-margin' | 'rules.worn-within-fresh';

/** Rules that contradict each other, each with the field that is asked to give way. */
export function rulesFaults(rules: HouseRules): { field: keyof HouseRules; code: RulesFault }[] {
  const faults: [boolean, keyof HouseRules, RulesFault][] = [
    [rules.deskMin < rules.otherMechanicMin, 'deskMin', 'rules.desk-before-mechanic'],
    [rules.managerMin < rules.deskMin, 'managerMin', 'rules.manager-before-desk'],
    [rules.planLeadMin <= rules.dressMarginMin, 'planLeadMin', 'rules.lead-within-margin'],
    [rules.wornDeliveries <= rules.freshDeliveries, 'wornDeliveries', 'rules.worn-within-fresh'],
    [rules.wornHours <= rules.freshHours, 'wornHours', 'rules.worn-within-fresh'],
  ];
  return faults.filter(([stands]) => stands).map(([, field, code]) => ({ field, code }));
}
