import { demandAmount } from './demand.ts';

/** One part's life in any one unit of use; `failed` false: still in service, or removed for another reason (right-censored). */
export type Life = { time: number; failed: boolean };

/** Lives in order of time with the counts at each distinct time; censored lives count as at risk at their own time. */
export type RiskRow = { time: number; atRisk: number; failures: number; censored: number };

export function riskTable(lives: readonly Life[]): RiskRow[] {
  lives.forEach((life) => demandAmount('time', life.time));
  const sorted = [...lives].sort((a, b) => a.time - b.time);
  const rows: RiskRow[] = [];
  let row: RiskRow | undefined;
  sorted.forEach((life, i) => {
    if (row === undefined || row.time !== life.time) {
      row = { time: life.time, atRisk: sorted.length - i, failures: 0, censored: 0 };
      rows.push(row);
    }
    if (life.failed) row.failures += 1;
    else row.censored += 1;
  });
  return rows;
}
