import { type DeviceEvent, teller } from './events.ts';
import { HOUSE, SOURCES } from './invented-house.ts';
import { random } from './random.ts';
import { MINUTE, type NightKey, wallInstant, words } from './timetable.ts';

/** Faults that belong to a pair or to the house, and bowlers who press for help. */
export function troubleEvents(night: NightKey, anchored: boolean): DeviceEvent[] {
  const draw = random(...words(night), 'trouble');
  const tell = teller(SOURCES.backRoom, `${night.date}-trouble`);
  const events: DeviceEvent[] = [];
  const when = () => wallInstant(night, draw.whole(HOUSE.opensAt + 60, HOUSE.closesAt - 90));
  for (let n = draw.whole(0, 2); n > 0; n -= 1) {
    const lane = draw.whole(1, HOUSE.lanes);
    const equipment = draw.pick(['ball-return', 'ball-lift', 'foul-unit', 'scoring', 'masking'] as const);
    const at = when();
    events.push(tell(at, 'equipment.faulted', { lane, equipment, text: FAULTS[equipment] }), tell(at + draw.around(4.5 * MINUTE, 0.5), 'equipment.restored', { lane, equipment }));
  }
  for (let n = draw.whole(0, 2); n > 0; n -= 1) {
    events.push(tell(when(), 'call.requested', { lane: draw.whole(1, HOUSE.lanes), equipment: draw.pick(['pinsetter', 'scoring', 'ball-return'] as const), text: draw.pick(['ball not returned', 'screen frozen', 'pins not reset']) }));
  }
  if (!anchored && draw.chance(0.06)) events.push(...powerDip(tell, when()));
  return events;
}

const FAULTS = {
  'ball-return': 'ball not returned', 'ball-lift': 'lift belt slipping', 'foul-unit': 'foul unit dark', 'scoring': 'no pinfall', 'masking': 'masking lamp out',
} as const;

/** A dip on the segment of lanes 1–8: one event of the house, eight machines that halt. */
function powerDip(tell: ReturnType<typeof teller>, at: number): DeviceEvent[] {
  const lanes = [1, 2, 3, 4, 5, 6, 7, 8];
  return [
    tell(at, 'equipment.faulted', { lane: 1, equipment: 'power', text: 'dip on segment 1–8' }),
    ...lanes.map((lane) => tell(at + lane * 40, 'pinsetter.stopped', { lane, reason: 'power' })),
    ...lanes.map((lane) => tell(at + 3 * MINUTE + lane * 9000, 'pinsetter.restarted', { lane })),
    tell(at + 4.5 * MINUTE, 'equipment.restored', { lane: 1, equipment: 'power' }),
  ];
}
