import { describe, expect, it } from 'vitest';
import { filmStrength, freshness, hoursBetween, meetsFreshDemand } from './ageing.ts';

describe('ageing', () => {
  it('is fresh up to both limits, worn beyond either', () => {
    const at = (deliveries: number | null, hours: number | null) => freshness({ deliveries, hours });
    expect([at(0, 0), at(100, 4), at(101, 4), at(100, 4.01)]).toEqual(['fresh', 'fresh', 'ageing', 'ageing']);
    expect([at(500, 24), at(501, 0), at(0, 24.01)]).toEqual(['ageing', 'worn', 'worn']);
    expect([at(null, 3), at(null, 30), at(20, null), at(600, null)]).toEqual(['fresh', 'worn', 'unknown', 'worn']);
  });

  it('estimates strength that only falls, and says so', () => {
    expect(filmStrength({ deliveries: 0, hours: 0 })).toEqual({ strength: 1, estimate: true });
    expect(filmStrength({ deliveries: 500, hours: 0 }).strength).toBe(0.5);
    expect(filmStrength({ deliveries: 500, hours: 24 }).strength).toBe(0.25);
    expect(filmStrength({ deliveries: 10, hours: null }).strength).toBeNull();
    const steps = [0, 50, 100, 400, 900].map((deliveries) => filmStrength({ deliveries, hours: 2 }).strength as number);
    expect(steps).toEqual([...steps].sort((a, b) => b - a));
  });

  it('accepts test balls for a fresh demand, and no more', () => {
    expect([meetsFreshDemand(0), meetsFreshDemand(5), meetsFreshDemand(6), meetsFreshDemand(null)]).toEqual([true, true, false, null]);
    expect(hoursBetween(0, 5_400_000)).toBe(1.5);
    expect(hoursBetween(10, 0)).toBe(0);
  });
});
