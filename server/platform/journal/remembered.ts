import type { Days } from './days.ts';

/** What a process remembers of a centre: true at one sequence number. Never changed in place. */
export interface Memory {
  seq: number;
  epoch: string;
  days: Days;
  /** When a fact last came for an earlier day than the newest, by received time. */
  lateAt: number;
}
