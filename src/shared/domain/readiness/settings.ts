import { type AgeingSettings, DEFAULT_AGEING } from '../runs/ageing.ts';
import { USUAL_LANE_MS } from '../runs/lane-time.ts';
import type { CheckName } from './check.ts';

const MINUTE = 60_000;

export interface ReadinessSettings {
  /** Whether a failing check holds the session, only warns, or isn't looked at. */
  weights: Record<CheckName, 'holds' | 'warns' | 'ignored'>;
  /** Lanes should be dressed this long before warm-up, ms: what ends later is tight. */
  dressMarginMs: number;
  /** Until this long before warm-up a lane that nobody plans to dress is at risk, after that it holds, ms. */
  planLeadMs: number;
  /** From this long before warm-up on, people on a lane without a known end put it at risk, ms. */
  unknownEndMs: number;
  /** Time a lane with moves before a machine's own pace is known, ms. */
  usualPaceMs: number;
  /** A machine that has said nothing for so many of its paces is thought to stand. */
  stalledPaces: number;
  lowBatteryPct: number;
  /** So many stops in so many frames of a lane put it at risk. */
  repeatedStops: { stops: number; frames: number };
  /** Offers: how far the deliveries since dressing may differ from the session's other lanes. */
  offerDeliveries: number;
  ageing: AgeingSettings;
}

/** Common practice, to begin with; every centre may change them. */
export const DEFAULT_READINESS: ReadinessSettings = {
  weights: {
    pattern: 'holds', 'run-complete': 'holds', machine: 'warns', 'lane-free': 'holds', pinsetter: 'holds', 'repeated-stops': 'warns',
    'other-equipment': 'holds', bumpers: 'warns', certificate: 'holds',
  },
  dressMarginMs: 4 * MINUTE,
  planLeadMs: 120 * MINUTE,
  unknownEndMs: 60 * MINUTE,
  usualPaceMs: USUAL_LANE_MS,
  stalledPaces: 3,
  lowBatteryPct: 20,
  repeatedStops: { stops: 3, frames: 200 },
  offerDeliveries: 60,
  ageing: DEFAULT_AGEING,
};
