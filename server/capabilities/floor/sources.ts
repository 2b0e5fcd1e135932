import type { CallView, FloorSnapshot, RunBar, SessionBar } from '#shared/contracts/floor.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import type { HouseRules } from '#shared/domain/house-rules.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

export interface PatternFacts {
  lengthFt: number;
  verified: boolean;
}

/** What the floor asks of the slices whose matters it shows; compose.ts joins their front doors to it. */
export interface FloorSources {
  callView(call: Call, house: House, now: number, rules: HouseRules): CallView;
  runBars(centre: CentreRef, house: House, now: number): Promise<RunBar[]>;
  machines(centre: CentreRef, house: House): Promise<FloorSnapshot['machines']>;
  /** Length and standing of a revision; undefined when the centre knows no pattern of that name. */
  patterns(centre: CentreRef): Promise<(code: string, revision: number | null) => PatternFacts | undefined>;
  sessions(centre: CentreRef, house: House, now: number): Promise<SessionBar[]>;
  gateways(centre: CentreRef, now: number): Promise<(FloorSnapshot['gateways'][number] & { id: string })[]>;
  tonight(centre: CentreRef, house: House, now: number): Promise<FloorSnapshot['tonight']>;
}
