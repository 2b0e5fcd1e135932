import { boardIndex, type Pass, type PatternRevision, type Product } from './pattern.ts';
import { passVolume } from './volume.ts';

/** What a lane machine can do, from its record. Nothing here names a maker: machines differ by these facts. */
export interface MachineCapability {
  oils: boolean;
  cleans: boolean;
  deckTreatment: boolean;
  /** Tanks of conditioner it carries. */
  products: readonly Product[];
  /** One volume a board for everything, or a volume per load; µL. */
  volume: { kind: 'fixed'; ul: number } | { kind: 'per-load'; minUl: number; maxUl: number; stepUl: number };
  /** Boards that the oil head reaches, 1–39 from the left. */
  headBoards: { first: number; last: number };
  maxLengthFt: number;
  /** Last feet in which it only buffs. */
  tailOffFt: number;
  maxPasses: number;
  maxLoads: number;
  /** Buffer speeds: the ones it has, or a span. Revolutions a minute. */
  buffer: { speeds: readonly number[] } | { minRpm: number; maxRpm: number };
  /** Travel speeds in tenths of in/s: the ones it has, or a span. */
  travel: { speeds: readonly number[] } | { min: number; max: number };
  /** Pre-mixed cleaner lays one mix; mixed on board may change by zones. */
  cleaner: { kind: 'premixed'; waterParts: number } | { kind: 'on-board'; maxWaterParts: number; maxZones: number };
  /** How it gets from lane to lane, and how a pattern gets into it. */
  moves: 'walks' | 'is-moved' | 'trails-cord';
  battery: boolean;
  patterns: 'network' | 'hand';
}

export type CannotLayCode =
  | 'machine.cannot-oil' | 'machine.cannot-clean' | 'machine.no-deck-treatment' | 'machine.product-not-carried'
  | 'machine.one-volume-only' | 'machine.volume-out-of-range' | 'machine.volume-step' | 'machine.board-out-of-reach'
  | 'machine.length-too-long' | 'machine.into-tail-off' | 'machine.too-many-passes' | 'machine.too-many-loads'
  | 'machine.buffer-speed' | 'machine.travel-speed' | 'machine.cleaner-ratio' | 'machine.cleaner-zones';

export interface CannotLay {
  code: CannotLayCode;
  /** From 1. */
  pass?: number;
  zone?: number;
  params: Record<string, number | string>;
}

export interface RunDemand {
  oil: boolean;
  clean: boolean;
  deckTreatment: boolean;
}

const inSpan = (value: number, set: { speeds: readonly number[] } | { min: number; max: number }): boolean =>
  'speeds' in set ? set.speeds.includes(value) : value >= set.min && value <= set.max;

const spanText = (set: { speeds: readonly number[] } | { min: number; max: number }): string =>
  'speeds' in set ? set.speeds.join(', ') : `${set.min}–${set.max}`;

function volumeReasons(pass: Pass, machine: MachineCapability): CannotLay[] {
  if (passVolume(pass) === 0) return [];
  const { volume } = machine;
  if (volume.kind === 'fixed') return pass.ul === volume.ul ? [] : [{ code: 'machine.one-volume-only', params: { ul: pass.ul, machineUl: volume.ul } }];
  if (pass.ul < volume.minUl || pass.ul > volume.maxUl) {
    return [{ code: 'machine.volume-out-of-range', params: { ul: pass.ul, min: volume.minUl, max: volume.maxUl } }];
  }
  return (pass.ul - volume.minUl) % volume.stepUl === 0 ? [] : [{ code: 'machine.volume-step', params: { ul: pass.ul, step: volume.stepUl } }];
}

function oilReasons(pass: Pass, revision: PatternRevision, machine: MachineCapability): CannotLay[] {
  if (passVolume(pass) === 0) return [];
  const reasons = volumeReasons(pass, machine);
  if (!machine.products.includes(pass.product)) reasons.push({ code: 'machine.product-not-carried', params: { product: pass.product } });
  const { first, last } = machine.headBoards;
  if (boardIndex(pass.fromBoard) < first || boardIndex(pass.toBoard) > last) reasons.push({ code: 'machine.board-out-of-reach', params: { first, last } });
  const reach = Math.max(pass.fromFt, pass.toFt);
  const free = revision.lengthFt - machine.tailOffFt;
  if (reach > free + 1e-9) reasons.push({ code: 'machine.into-tail-off', params: { ft: reach, max: free } });
  if (pass.loads > machine.maxLoads) reasons.push({ code: 'machine.too-many-loads', params: { loads: pass.loads, max: machine.maxLoads } });
  return reasons;
}

function speedReasons(pass: Pass, machine: MachineCapability): CannotLay[] {
  const reasons: CannotLay[] = [];
  const buffer = 'speeds' in machine.buffer ? machine.buffer : { min: machine.buffer.minRpm, max: machine.buffer.maxRpm };
  if (pass.rpm !== undefined && !inSpan(pass.rpm, buffer)) reasons.push({ code: 'machine.buffer-speed', params: { rpm: pass.rpm, has: spanText(buffer) } });
  if (pass.speed !== undefined && !inSpan(pass.speed, machine.travel)) {
    reasons.push({ code: 'machine.travel-speed', params: { speed: pass.speed, has: spanText(machine.travel) } });
  }
  return reasons;
}

function cleanerReasons(revision: PatternRevision, machine: MachineCapability): CannotLay[] {
  const zones = revision.cleanerZones ?? [];
  const { cleaner } = machine;
  const reasons: CannotLay[] = [];
  if (cleaner.kind === 'on-board' && zones.length > cleaner.maxZones) reasons.push({ code: 'machine.cleaner-zones', params: { zones: zones.length, max: cleaner.maxZones } });
  zones.forEach((zone, i) => {
    const fits = cleaner.kind === 'premixed' ? zone.waterParts === cleaner.waterParts : zone.waterParts <= cleaner.maxWaterParts;
    const max = cleaner.kind === 'premixed' ? cleaner.waterParts : cleaner.maxWaterParts;
    if (!fits) reasons.push({ code: 'machine.cleaner-ratio', zone: i + 1, params: { parts: zone.waterParts, max } });
  });
  return reasons;
}

/** Can this machine lay this revision? Empty means yes; otherwise every reason, with its pass or zone. */
export function cannotLay(machine: MachineCapability, revision: PatternRevision, demand: RunDemand): CannotLay[] {
  const reasons: CannotLay[] = [];
  if (demand.oil && !machine.oils) reasons.push({ code: 'machine.cannot-oil', params: {} });
  if (demand.clean && !machine.cleans) reasons.push({ code: 'machine.cannot-clean', params: {} });
  if (demand.deckTreatment && !machine.deckTreatment) reasons.push({ code: 'machine.no-deck-treatment', params: {} });
  if (revision.lengthFt > machine.maxLengthFt) reasons.push({ code: 'machine.length-too-long', params: { ft: revision.lengthFt, max: machine.maxLengthFt } });
  if (revision.passes.length > machine.maxPasses) reasons.push({ code: 'machine.too-many-passes', params: { passes: revision.passes.length, max: machine.maxPasses } });
  if (demand.oil) {
    revision.passes.forEach((pass, i) => {
      const found = [...oilReasons(pass, revision, machine), ...speedReasons(pass, machine)];
      reasons.push(...found.map((reason) => ({ ...reason, pass: i + 1 })));
    });
  }
  if (demand.clean) reasons.push(...cleanerReasons(revision, machine));
  return reasons;
}
