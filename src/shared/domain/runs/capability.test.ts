import { describe, expect, it } from 'vitest';
import { cannotLay, type MachineCapability } from './capability.ts';
import type { Pass, PatternRevision } from './pattern.ts';

const machine: MachineCapability = {
  oils: true, cleans: true, deckTreatment: false, products: ['A'], volume: { kind: 'per-load', minUl: 30, maxUl: 60, stepUl: 5 },
  headBoards: { first: 2, last: 38 }, maxLengthFt: 52, tailOffFt: 2, maxPasses: 20, maxLoads: 9,
  buffer: { minRpm: 100, maxRpm: 700 }, travel: { speeds: [100, 140, 180, 260] },
  cleaner: { kind: 'on-board', maxWaterParts: 10, maxZones: 2 }, moves: 'walks', battery: true, patterns: 'network',
};
const pass: Pass = { direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 2, ul: 50, product: 'A', fromFt: 0, toFt: 30, speed: 140, rpm: 500 };
const zone = { fromFt: 0, toFt: 30, ulPerFt: 800, waterParts: 4 };
const both = { oil: true, clean: true, deckTreatment: false };
const revision = (change: Partial<Pass> = {}): PatternRevision => ({ lengthFt: 40, passes: [pass, { ...pass, ...change }], cleanerZones: [zone] });

describe('can this machine lay it', () => {
  it('says yes with no reasons', () => {
    expect(cannotLay(machine, revision(), both)).toEqual([]);
  });

  it('gives all the reasons at once, with the pass', () => {
    const reasons = cannotLay(machine, revision({ ul: 52, product: 'B', fromBoard: { side: 'L', n: 1 }, toFt: 39, loads: 12, speed: 120, rpm: 900 }), { ...both, deckTreatment: true });
    expect(reasons.map((r) => r.code)).toEqual([
      'machine.no-deck-treatment', 'machine.volume-step', 'machine.product-not-carried', 'machine.board-out-of-reach', 'machine.into-tail-off', 'machine.too-many-loads', 'machine.buffer-speed', 'machine.travel-speed',
    ]);
    expect(reasons.slice(1).every((r) => r.pass === 2)).toBe(true);
  });

  it('knows machines with one volume, and what they refuse', () => {
    const fixed: MachineCapability = { ...machine, volume: { kind: 'fixed', ul: 50 } };
    expect(cannotLay(fixed, revision(), both)).toEqual([]);
    expect(cannotLay(fixed, revision({ ul: 40 }), both)).toEqual([{ code: 'machine.one-volume-only', pass: 2, params: { ul: 40, machineUl: 50 } }]);
    expect(cannotLay(fixed, revision({ ul: 40, loads: 0, product: 'B' }), both)).toEqual([]);
    expect(cannotLay(machine, revision({ ul: 70 }), both)[0]?.code).toBe('machine.volume-out-of-range');
  });

  it('checks cleaner, length and what the machine is for', () => {
    const premixed: MachineCapability = { ...machine, cleaner: { kind: 'premixed', waterParts: 5 } };
    expect(cannotLay(premixed, revision(), both)).toEqual([{ code: 'machine.cleaner-ratio', zone: 1, params: { parts: 4, max: 5 } }]);
    const zones = { ...revision(), cleanerZones: [zone, { ...zone, fromFt: 30, toFt: 40 }, { ...zone, fromFt: 40, toFt: 50, waterParts: 11 }] };
    expect(cannotLay(machine, zones, both).map((r) => r.code)).toEqual(['machine.cleaner-zones', 'machine.cleaner-ratio']);
    expect(cannotLay({ ...machine, oils: false, cleans: false, maxPasses: 1, maxLengthFt: 39 }, revision(), both).map((r) => r.code)).toEqual(['machine.cannot-oil', 'machine.cannot-clean', 'machine.length-too-long', 'machine.too-many-passes']);
    expect(cannotLay({ ...machine, products: [] }, revision(), { oil: false, clean: true, deckTreatment: false })).toEqual([]);
  });
});
