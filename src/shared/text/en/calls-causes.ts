import type { CauseArea, CauseCode } from '../../domain/calls/causes-list.ts';
import { causeOf } from '../../domain/calls/causes.ts';

export const causeAreas: Record<CauseArea, string> = {
  'deck': 'Deck', 'distributor': 'Distributor', 'elevator': 'Elevator, pin wheel', 'turret': 'Turret, magazine', 'pit': 'Pit and carpet',
  'string': 'Strings', 'drum': 'Drum and guide', 'rake': 'Rake', 'drive': 'Drive', 'electrical': 'Electrical', 'sensor': 'Sensor',
  'lift': 'Ball lift', 'return': 'Ball return', 'foreign': 'Foreign object', 'bowler': 'Bowler', 'foul-unit': 'Foul unit',
  'scoring': 'Scoring', 'masking': 'Masking', 'bumpers': 'Bumpers', 'lane': 'Lane and approach', 'power': 'Power',
  'lane-machine': 'Lane machine', 'danger': 'Danger', 'other': 'Other',
};

/** The fault alone, under its area. */
export const causeFaults: Record<CauseCode, string> = {
  'deck.pin-off-spot': 'Pin off spot', 'deck.pocket-bent': 'Pocket bent', 'deck.stays-up': 'Does not come down',
  'distributor.pin-jam': 'Pin jammed', 'distributor.belt-worn': 'Belt worn or off',
  'elevator.pin-jam': 'Pin jammed', 'elevator.drive': 'Does not turn',
  'turret.pin-jam': 'Pin jammed', 'turret.stays': 'Does not step on', 'turret.wire-bent': 'Wire bent',
  'pit.pins-not-fed': 'Pins not fed', 'pit.carpet-torn': 'Carpet torn or slack',
  'string.tangle': 'Tangled', 'string.break': 'String broken', 'string.length': 'Length wrong',
  'drum.stays': 'Does not wind', 'drum.brake': 'Brake slips', 'drum.guide-bent': 'Guide bent',
  'rake.stays-up': 'Does not come down or up', 'rake.board-broken': 'Board broken',
  'drive.belt': 'Belt', 'drive.motor': 'Motor or gear',
  'electrical.fuse': 'Fuse or overload', 'electrical.wiring': 'Wire or plug', 'electrical.control': 'Control started anew',
  'sensor.dirty': 'Dirty, cleaned', 'sensor.broken': 'Broken or out of line',
  'lift.belt-slips': 'Belt slips', 'lift.blocked': 'Ball stuck in the lift',
  'return.ball-stuck': 'Ball stuck under the lane', 'return.track-worn': 'Track loose or worn',
  'foreign.in-machine': 'In the machine', 'foreign.in-pit': 'In the pit',
  'bowler.ball-on-rake': 'Ball against the rake', 'bowler.ball-in-channel': 'Ball stopped in the channel', 'bowler.asked-for-help': 'Needed help, no fault',
  'foul-unit.out-of-line': 'Out of line', 'foul-unit.dead': 'No light',
  'scoring.wrong-score': 'Score corrected', 'scoring.no-picture': 'No picture', 'scoring.no-reaction': 'Does not react',
  'masking.light': 'Light out', 'masking.panel': 'Panel loose', 'bumpers.stay-down': 'Stay down', 'bumpers.stay-up': 'Stay up',
  'lane.channel-loose': 'Channel loose or blocked', 'lane.oil-carried': 'Oil carried or spilt', 'lane.surface-damaged': 'Surface damaged',
  'lane.approach-cleaned': 'Approach cleaned and dried', 'power.dip': 'Power dipped', 'power.breaker': 'Breaker tripped',
  'lane-machine.stuck': 'Stuck on the lane', 'lane-machine.fault': 'Fault of the machine',
  'danger.approach-dried': 'Approach cleaned and dried', 'danger.ball-fetched': 'Ball fetched, machine was off', 'danger.pit-empty': 'Nobody in the pit any more',
  'danger.smoke-traced': 'Source of smoke found and made safe', 'danger.removed': 'Danger removed',
  'other.adjusted': 'Adjusted', 'other.nothing-found': 'Nothing found',
};

/** `Ball lift: belt slips`; a code of an older list stands for itself. */
export function causeText(code: string): string {
  const cause = causeOf(code);
  if (!cause) return code;
  const fault = causeFaults[cause.code];
  return `${causeAreas[cause.area]}: ${fault.charAt(0).toLowerCase()}${fault.slice(1)}`;
}
