import type { HouseRules } from '../../domain/house-rules.ts';
import { number } from './formats.ts';

/** What a house decides for itself, on its settings page. */
export const rulesWords = {
  title: 'Rules of the house',
  groups: {
    calls: { name: 'A call that nobody answers', lead: 'Who is asked next, and after how long. A danger is the desk’s at once.' },
    dressing: { name: 'Lanes before a session', lead: 'When they are to be dressed, and until when a plan may be missing.' },
    film: { name: 'Film', lead: 'What still counts as fresh, and from when on it is worn. Strength on the floor is an estimate by these.' },
  },
  fields: {
    otherMechanicMin: 'Other mechanic, min', deskMin: 'Desk, min', managerMin: 'Manager, min',
    dressMarginMin: 'Dressed before warm-up, min', planLeadMin: 'Planned before warm-up, min', lowBatteryPct: 'Battery is low below, %',
    freshDeliveries: 'Fresh up to, deliveries', freshHours: 'Fresh up to, hours', freshTolerance: 'Others’ deliveries on a fresh lane',
    wornDeliveries: 'Worn above, deliveries', wornHours: 'Worn above, hours',
  } satisfies Record<keyof HouseRules, string>,
  usual: (value: number) => `usually ${number(value)}`,
  noNumber: 'This takes a whole number.',
  save: 'Save the rules',
  saved: 'The rules hold from now on.',
  toUsual: 'Back to what is usual',
} as const;
