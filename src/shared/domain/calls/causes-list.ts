import type { Equipment } from '../equipment.ts';

/** Pinsetters that let pins fall free, those with pins on strings, or both. */
export type CauseFamily = 'free-fall' | 'string' | 'both';

/**
 * How a cause counts in the rates: a machine stop is the machine's own; bowlers and foreign objects are kept apart;
 * `other` is no stop of a pinsetter.
 */
export type CauseCounts = 'machine-stop' | 'bowler' | 'foreign-object' | 'other';

export interface CauseRow {
  code: string;
  area: string;
  family: CauseFamily;
  counts: CauseCounts;
  /** Metal has met pins: all pins in that machine want an inspection. */
  pinDamage?: true;
  /** Mending it means reaching in: the lockout record is expected. */
  lockout?: true;
}

const stop = 'machine-stop' as const;

/**
 * What a call can have been about, area × fault, in the order shown while nothing is known of this house's own
 * frequencies. Common practice of the trade; the wording is ours.
 */
export const CAUSES = [
  { code: 'deck.pin-off-spot', area: 'deck', family: 'free-fall', counts: stop },
  { code: 'deck.pocket-bent', area: 'deck', family: 'free-fall', counts: stop, pinDamage: true, lockout: true },
  { code: 'deck.stays-up', area: 'deck', family: 'both', counts: stop, lockout: true },
  { code: 'distributor.pin-jam', area: 'distributor', family: 'free-fall', counts: stop, lockout: true },
  { code: 'distributor.belt-worn', area: 'distributor', family: 'free-fall', counts: stop, lockout: true },
  { code: 'elevator.pin-jam', area: 'elevator', family: 'free-fall', counts: stop, lockout: true },
  { code: 'elevator.drive', area: 'elevator', family: 'free-fall', counts: stop, lockout: true },
  { code: 'turret.pin-jam', area: 'turret', family: 'free-fall', counts: stop, lockout: true },
  { code: 'turret.stays', area: 'turret', family: 'free-fall', counts: stop, lockout: true },
  { code: 'turret.wire-bent', area: 'turret', family: 'free-fall', counts: stop, pinDamage: true, lockout: true },
  { code: 'pit.pins-not-fed', area: 'pit', family: 'free-fall', counts: stop, lockout: true },
  { code: 'pit.carpet-torn', area: 'pit', family: 'free-fall', counts: stop, lockout: true },
  { code: 'string.tangle', area: 'string', family: 'string', counts: stop, lockout: true },
  { code: 'string.break', area: 'string', family: 'string', counts: stop, lockout: true },
  { code: 'string.length', area: 'string', family: 'string', counts: stop, lockout: true },
  { code: 'drum.stays', area: 'drum', family: 'string', counts: stop, lockout: true },
  { code: 'drum.brake', area: 'drum', family: 'string', counts: stop, lockout: true },
  { code: 'drum.guide-bent', area: 'drum', family: 'string', counts: stop, pinDamage: true, lockout: true },
  { code: 'rake.stays-up', area: 'rake', family: 'both', counts: stop, lockout: true },
  { code: 'rake.board-broken', area: 'rake', family: 'both', counts: stop, lockout: true },
  { code: 'drive.belt', area: 'drive', family: 'both', counts: stop, lockout: true },
  { code: 'drive.motor', area: 'drive', family: 'both', counts: stop, lockout: true },
  { code: 'electrical.fuse', area: 'electrical', family: 'both', counts: stop, lockout: true },
  { code: 'electrical.wiring', area: 'electrical', family: 'both', counts: stop, lockout: true },
  { code: 'electrical.control', area: 'electrical', family: 'both', counts: stop },
  { code: 'sensor.dirty', area: 'sensor', family: 'both', counts: stop },
  { code: 'sensor.broken', area: 'sensor', family: 'both', counts: stop },
  { code: 'lift.belt-slips', area: 'lift', family: 'both', counts: 'other', lockout: true },
  { code: 'lift.blocked', area: 'lift', family: 'both', counts: 'other', lockout: true },
  { code: 'return.ball-stuck', area: 'return', family: 'both', counts: 'other' },
  { code: 'return.track-worn', area: 'return', family: 'both', counts: 'other' },
  { code: 'foreign.in-machine', area: 'foreign', family: 'both', counts: 'foreign-object', lockout: true },
  { code: 'foreign.in-pit', area: 'foreign', family: 'both', counts: 'foreign-object', lockout: true },
  { code: 'bowler.ball-on-rake', area: 'bowler', family: 'both', counts: 'bowler' },
  { code: 'bowler.ball-in-channel', area: 'bowler', family: 'both', counts: 'bowler' },
  { code: 'bowler.asked-for-help', area: 'bowler', family: 'both', counts: 'bowler' },
  { code: 'foul-unit.out-of-line', area: 'foul-unit', family: 'both', counts: 'other' },
  { code: 'foul-unit.dead', area: 'foul-unit', family: 'both', counts: 'other' },
  { code: 'scoring.wrong-score', area: 'scoring', family: 'both', counts: 'other' },
  { code: 'scoring.no-picture', area: 'scoring', family: 'both', counts: 'other' },
  { code: 'scoring.no-reaction', area: 'scoring', family: 'both', counts: 'other' },
  { code: 'masking.light', area: 'masking', family: 'both', counts: 'other' },
  { code: 'masking.panel', area: 'masking', family: 'both', counts: 'other' },
  { code: 'bumpers.stay-down', area: 'bumpers', family: 'both', counts: 'other' },
  { code: 'bumpers.stay-up', area: 'bumpers', family: 'both', counts: 'other' },
  { code: 'lane.channel-loose', area: 'lane', family: 'both', counts: 'other' },
  { code: 'lane.oil-carried', area: 'lane', family: 'both', counts: 'other' },
  { code: 'lane.surface-damaged', area: 'lane', family: 'both', counts: 'other' },
  { code: 'lane.approach-cleaned', area: 'lane', family: 'both', counts: 'other' },
  { code: 'power.dip', area: 'power', family: 'both', counts: 'other' },
  { code: 'power.breaker', area: 'power', family: 'both', counts: 'other' },
  { code: 'lane-machine.stuck', area: 'lane-machine', family: 'both', counts: 'other' },
  { code: 'lane-machine.fault', area: 'lane-machine', family: 'both', counts: 'other' },
  { code: 'danger.approach-dried', area: 'danger', family: 'both', counts: 'other' },
  { code: 'danger.ball-fetched', area: 'danger', family: 'both', counts: 'other' },
  { code: 'danger.pit-empty', area: 'danger', family: 'both', counts: 'other' },
  { code: 'danger.smoke-traced', area: 'danger', family: 'both', counts: 'other' },
  { code: 'danger.removed', area: 'danger', family: 'both', counts: 'other' },
  { code: 'other.adjusted', area: 'other', family: 'both', counts: stop },
  { code: 'other.nothing-found', area: 'other', family: 'both', counts: stop },
] as const satisfies readonly CauseRow[];

export type CauseCode = (typeof CAUSES)[number]['code'];
export type CauseArea = (typeof CAUSES)[number]['area'];

/** Areas that belong to a kind of equipment; `bowler`, `foreign` and `other` are offered for everything. */
export const AREAS_OF: Record<Equipment, readonly CauseArea[]> = {
  'pinsetter': ['deck', 'distributor', 'elevator', 'turret', 'pit', 'string', 'drum', 'rake', 'drive', 'electrical', 'sensor'],
  'ball-return': ['return', 'lift', 'electrical', 'sensor'],
  'ball-lift': ['lift', 'return', 'electrical', 'sensor'],
  'foul-unit': ['foul-unit', 'electrical'],
  'scoring': ['scoring', 'sensor', 'electrical'],
  'console': ['scoring', 'electrical'],
  'masking': ['masking', 'electrical'],
  'bumpers': ['bumpers', 'electrical'],
  'channel': ['lane'],
  'lane-surface': ['lane'],
  'approach': ['lane'],
  'power': ['power', 'electrical'],
  'motion-sensor': ['sensor', 'electrical'],
  'lane-machine': ['lane-machine', 'lane'],
};
export const AREAS_OF_ALL: readonly CauseArea[] = ['foreign', 'bowler', 'other'];
