import type { Fact } from '../journal/fact.ts';
import { count } from './counts.ts';
import { backInService, outOfService, power, restart, stop } from './machine.ts';
import type { FloorState } from './state.ts';
import { close, move, open, progress } from './uses.ts';

/** (floor, fact) → floor, for facts in their order. Facts about calls and runs reach the floor through `house/fold.ts`. */
export function foldFloor(floor: FloorState, fact: Fact): FloorState {
  switch (fact.type) {
    case 'lane.opened': return open(floor, fact);
    case 'lane.closed': return close(floor, fact);
    case 'lane.moved': return move(floor, fact);
    case 'lane.counted': return count(floor, fact);
    case 'game.progress': return progress(floor, fact);
    case 'pinsetter.on':
    case 'pinsetter.off': return power(floor, fact);
    case 'pinsetter.stopped': return stop(floor, fact);
    case 'pinsetter.restarted': return restart(floor, fact);
    case 'lane.out-of-service': return outOfService(floor, fact);
    case 'lane.back-in-service': return backInService(floor, fact);
    default: return floor;
  }
}
