import { boardsCovered, type CleanerZone, type Direction, type Pass, type PatternRevision, type Product } from './pattern.ts';

/** Conditioner of one pass in µL: loads × boards × µL (common practice). */
export function passVolume(pass: Pass): number {
  return pass.loads * boardsCovered(pass) * pass.ul;
}

export interface VolumeTotals {
  totalUl: number;
  byProduct: Record<Product, number>;
  byDirection: Record<Direction, number>;
  /** In the order of the revision's passes. */
  byPass: number[];
}

/** All totals of one lane, integers in µL. */
export function patternVolume(revision: Pick<PatternRevision, 'passes'>): VolumeTotals {
  const totals: VolumeTotals = { totalUl: 0, byProduct: { A: 0, B: 0 }, byDirection: { outbound: 0, return: 0 }, byPass: [] };
  for (const pass of revision.passes) {
    const ul = passVolume(pass);
    totals.totalUl += ul;
    totals.byProduct[pass.product] += ul;
    totals.byDirection[pass.direction] += ul;
    totals.byPass.push(ul);
  }
  return totals;
}

export interface CleanerVolume {
  mixUl: number;
  concentrateUl: number;
  waterUl: number;
}

const zoneVolume = (zone: CleanerZone): CleanerVolume => {
  const mixUl = Math.round(((Math.round(zone.toFt * 10) - Math.round(zone.fromFt * 10)) * zone.ulPerFt) / 10);
  const concentrateUl = Math.round(mixUl / (zone.waterParts + 1));
  return { mixUl, concentrateUl, waterUl: mixUl - concentrateUl };
};

/** Cleaner of one lane by its ratio zones, each zone rounded to whole µL; water + concentrate = mix. */
export function cleanerVolume(revision: Pick<PatternRevision, 'cleanerZones'>): CleanerVolume & { byZone: CleanerVolume[] } {
  const byZone = (revision.cleanerZones ?? []).map(zoneVolume);
  const sum = (key: keyof CleanerVolume) => byZone.reduce((total, zone) => total + zone[key], 0);
  return { mixUl: sum('mixUl'), concentrateUl: sum('concentrateUl'), waterUl: sum('waterUl'), byZone };
}
