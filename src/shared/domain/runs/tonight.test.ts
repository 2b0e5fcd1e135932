import { describe, expect, it } from 'vitest';
import type { MachineCapability } from './capability.ts';
import type { PatternRevision } from './pattern.ts';
import { type DressingWant, dressingTonight, type Night, type NightMachine } from './tonight.ts';

const MIN = 60_000;
const NOW = Date.UTC(2026, 4, 14, 18, 0);
const at = (minutes: number): number => NOW + minutes * MIN;

const CAN: MachineCapability = {
  oils: true, cleans: true, deckTreatment: false, products: ['A'], volume: { kind: 'per-load', minUl: 10, maxUl: 60, stepUl: 1 }, headBoards: { first: 1, last: 39 }, maxLengthFt: 60,
  tailOffFt: 2, maxPasses: 30, maxLoads: 20, buffer: { minRpm: 100, maxRpm: 700 }, travel: { min: 1, max: 1000 }, cleaner: { kind: 'premixed', waterParts: 4 }, moves: 'walks', battery: true, patterns: 'network',
};
const body = (product: 'A' | 'B'): PatternRevision => ({ lengthFt: 40, passes: [{ direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 2, ul: 50, product, fromFt: 0, toFt: 30 }] });
const machine = (code: string, change: Partial<NightMachine> = {}): NightMachine => ({ code, capabilities: CAN, paceMs: 2 * MIN, busyUntil: null, atLane: null, loadedPattern: 'owls', ...change });
const want = (session: string, lanes: number[], warmUp: number, change: Partial<DressingWant> = {}): DressingWant => ({
  session, name: session, warmUpAt: at(warmUp), pattern: 'owls', revision: null, lanes: lanes.map((lane) => ({ lane, freeAt: NOW, run: null })), ...change,
});
const night = (change: Partial<Night>): Night => ({
  now: NOW, marginMs: 4 * MIN, wants: [], machines: [machine('heron')], planned: [], underWay: [],
  revisionOf: (code, revision) => (code === 'owls' ? { revision: revision ?? 3, body: body('A') } : code === 'twin' ? { revision: 1, body: body('B') } : undefined), ...change,
});

describe('what is still to be dressed tonight', () => {
  it('plans lanes that no run has, as late as is safe, and says until when it may begin', () => {
    const tonight = dressingTonight(night({ wants: [want('trios', [1, 2, 3, 4], 60)] }));
    expect(tonight?.blocks).toEqual([{
      id: 'trios:owls:1-4', run: null, session: 'trios', pattern: 'owls', revision: 3, machine: 'heron', lanes: [1, 2, 3, 4],
      startAt: at(60 - 4 - 8), endAt: at(60 - 4), startBy: at(60 - 8), breaksFirst: 'trios', freeUnknown: [],
    }]);
    expect(tonight?.proof.proven.sessionsLate).toBe(true);
  });

  it('lanes that free later wait for it; what a machine does without a stop in between is one stretch', () => {
    const freed = (minutes: number) => want('trios', [], 60, { lanes: [1, 2, 3, 4].map((lane) => ({ lane, freeAt: at(lane < 3 ? 0 : minutes), run: null })) });
    const stretches = (wants: DressingWant[]) => dressingTonight(night({ wants }))?.blocks.map((block) => [block.lanes, (block.startAt - NOW) / MIN, (block.endAt - NOW) / MIN]);
    expect(stretches([freed(52)])).toEqual([[[1, 2, 3, 4], 48, 56]]);
    const [mixed, freedLate] = stretches([freed(55), want('mixed', [5, 6], 58)]) ?? [];
    expect([mixed?.[0], freedLate]).toEqual([[5, 6], [[1, 2, 3, 4], 51, 59]]);
  });

  it('a planned run keeps its machine and start; it must begin by when its session can’t wait longer, and the rest goes around it', () => {
    const lanes = [1, 2].map((lane) => ({ lane, freeAt: NOW, run: 'heron/7' }));
    const planned = [{ key: 'heron/7', machine: 'heron', pattern: 'owls', revision: 3, lanes: [1, 2], startAt: at(20) }];
    const blocks = dressingTonight(night({ wants: [want('trios', [], 60, { lanes }), want('mixed', [5, 6], 26)], planned }))?.blocks ?? [];
    const [mixed, trios] = blocks;
    expect(trios).toMatchObject({ run: 'heron/7', startAt: at(20), endAt: at(24), startBy: at(56), breaksFirst: 'trios' });
    expect(mixed).toMatchObject({ run: null, session: 'mixed', lanes: [5, 6], machine: 'heron' });
    expect(mixed?.endAt).toBeLessThanOrEqual(at(20));
  });

  it('a run that nobody waits for has no latest start; one under way settles its lanes and keeps its machine busy', () => {
    const planned = [{ key: 'heron/7', machine: 'heron', pattern: 'owls', revision: 3, lanes: [9, 10], startAt: at(30) }];
    expect(dressingTonight(night({ planned }))?.blocks).toMatchObject([{ run: 'heron/7', session: null, startAt: at(30), startBy: null, breaksFirst: null }]);
    const lanes = [1, 2].map((lane) => ({ lane, freeAt: NOW, run: lane === 1 ? 'heron/6' : null }));
    const busy = dressingTonight(night({ wants: [want('trios', [], 20, { lanes })], underWay: ['heron/6'], machines: [machine('heron', { busyUntil: at(15), atLane: 1 })] }));
    expect(busy?.blocks.map((block) => [block.lanes, block.startAt])).toEqual([[[2], at(15)]]);
    expect(busy?.late).toMatchObject([{ session: 'trios', byMs: 1 * MIN }]);
  });

  it('says what can’t be planned: no machine lays it, or the session names no pattern; nothing at all without a machine', () => {
    const tonight = dressingTonight(night({ wants: [want('twins', [1, 2], 60, { pattern: 'twin' }), want('any', [3, 4], 60, { pattern: null })] }));
    expect(tonight?.blocks).toEqual([]);
    expect(tonight?.unplanned.map((one) => [one.session, one.lanes, one.because.map((b) => b.code)])).toEqual([['twins', [1, 2], ['block.no-machine']], ['any', [3, 4], ['block.no-pattern']]]);
    expect(dressingTonight(night({ machines: [] }))).toBeNull();
  });

  it('the two of two machines that makes nobody late does the work', () => {
    const wants = [want('early', [1, 2, 3, 4, 5, 6], 17), want('other', [11, 12, 13, 14, 15, 16], 17)];
    expect(dressingTonight(night({ wants }))?.late).toHaveLength(1);
    const both = dressingTonight(night({ wants, machines: [machine('heron'), machine('wren')] }));
    expect(both?.late).toEqual([]);
    expect(new Set(both?.blocks.map((block) => block.machine))).toEqual(new Set(['heron', 'wren']));
  });
});
