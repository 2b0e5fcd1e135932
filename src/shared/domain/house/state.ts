import { type CallsState, emptyCalls } from '../calls/state.ts';
import { emptyFloor, type FloorState } from '../floor/state.ts';
import { emptyRuns, type RunsState } from '../runs/state.ts';

/** Everything that the journal of one centre says, folded. Immutable: folds share what they don't touch. */
export interface House {
  floor: FloorState;
  calls: CallsState;
  runs: RunsState;
}

export const emptyHouse = (lanes: number): House => ({ floor: emptyFloor(lanes), calls: emptyCalls, runs: emptyRuns });
