import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** What the demo's loader leaves for the fake gateway: the house's clock, where tonight is anchored, and the keys. */
export interface DemoPlan {
  centre: string;
  zone: string;
  seed: number;
  /** Business date and instant of the first start. */
  firstDate: string;
  anchorAt: number;
  gateways: { source: string; key: string; skewMs: number }[];
}

export const DEMO_PLAN = 'demo.json';

/** @throws Error when the demo hasn't been loaded in this folder. */
export function readPlan(dataDir: string): DemoPlan {
  const file = join(dataDir, DEMO_PLAN);
  try {
    return JSON.parse(readFileSync(file, 'utf8')) as DemoPlan;
  } catch (error) {
    throw new Error(`No demo has been loaded: ${file} can't be read. Start Lanewright with its demo first.`, { cause: error });
  }
}
