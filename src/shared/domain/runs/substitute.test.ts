import { expect, it } from 'vitest';
import { cannotLay, type MachineCapability } from './capability.ts';
import type { Pass, PatternRevision } from './pattern.ts';
import { substituteFor } from './substitute.ts';

const MACHINE: MachineCapability = {
  oils: true, cleans: true, deckTreatment: false, products: ['A'], volume: { kind: 'fixed', ul: 50 }, headBoards: { first: 2, last: 38 }, maxLengthFt: 52, tailOffFt: 2, maxPasses: 30, maxLoads: 9,
  buffer: { minRpm: 100, maxRpm: 700 }, travel: { min: 1, max: 1000 }, cleaner: { kind: 'premixed', waterParts: 4 }, moves: 'is-moved', battery: false, patterns: 'hand',
};
const pass = (change: Partial<Pass>): Pass => ({ direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 3, ul: 50, product: 'A', fromFt: 0, toFt: 20, ...change });
const sheet = (...passes: Pass[]): PatternRevision => ({ lengthFt: 40, passes });

it('three loads of 40 µL become two of 50: 20 µL less on each of the 37 boards', () => {
  const nearest = substituteFor(MACHINE, sheet(pass({ ul: 40 })));
  expect(nearest?.revision.passes).toMatchObject([{ loads: 2, ul: 50 }]);
  expect(nearest?.differenceUl).toEqual([0, ...Array.from({ length: 37 }, () => -20), 0]);
});
it('a product that isn’t carried is laid with the one that is', () => {
  const nearest = substituteFor(MACHINE, sheet(pass({ product: 'B' })));
  expect(nearest?.revision.passes).toMatchObject([{ loads: 3, ul: 50, product: 'A' }]);
  expect(cannotLay(MACHINE, nearest!.revision, { oil: true, clean: false, deckTreatment: false })).toEqual([]);
});
it('none where none is needed, or none would do', () => {
  expect(substituteFor(MACHINE, sheet(pass({})))).toBeNull();
  expect(substituteFor({ ...MACHINE, volume: { kind: 'per-load', minUl: 50, maxUl: 50, stepUl: 5 } }, sheet(pass({ ul: 40 })))).toBeNull();
  expect(substituteFor({ ...MACHINE, maxLengthFt: 35 }, sheet(pass({ ul: 40 })))).toBeNull();
});
