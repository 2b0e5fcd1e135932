import type { Call } from '#shared/domain/calls/state.ts';
import type { House } from '#shared/domain/house/state.ts';
import { fromBinary, toBinary } from '../../db/uuid.ts';
import { json, type Projection, type Row, time, unshared } from './rows.ts';

const callsOf = (house: House): Call[] => [...house.calls.closed, ...Object.values(house.calls.open)];

export const calls: Projection = {
  table: 'call',
  key: ['id'],
  columns: [
    'call_key', 'scope', 'lane', 'equipment', 'safety', 'lanes_held', 'raised_at', 'received_at', 'raised_by', 'origin', 'text', 'code', 'status',
    'acknowledged_at', 'acknowledged_by', 'on_lane_at', 'on_lane_by', 'parked', 'out_of_service', 'returned_at', 'cleared_at', 'cleared_by', 'cause',
    'note', 'lockout', 'stops', 'steps', 'raises', 'last_at',
  ],
  rows: (house, other) => (other?.calls === house.calls ? [] : unshared(callsOf(house), other ? callsOf(other) : []).map(rowOf)),
};

function rowOf(call: Call): Row {
  return {
    id: toBinary(call.id), call_key: call.key, scope: call.scope, lane: call.lane, equipment: call.equipment, safety: call.safety,
    lanes_held: json(call.lanesHeld), raised_at: new Date(call.raisedAt), received_at: new Date(call.receivedAt), raised_by: json(call.raisedBy),
    origin: call.origin, text: call.text, code: call.code, status: call.status, acknowledged_at: time(call.acknowledged?.at ?? null),
    acknowledged_by: json(call.acknowledged?.by), on_lane_at: time(call.onLane?.at ?? null), on_lane_by: json(call.onLane?.by), parked: json(call.parked),
    out_of_service: json(call.outOfService), returned_at: time(call.returnedAt), cleared_at: time(call.cleared?.at ?? null),
    cleared_by: json(call.cleared?.by), cause: call.cleared?.cause ?? null, note: call.cleared?.note ?? null, lockout: json(call.lockout),
    stops: json(call.stops), steps: json(call.steps), raises: json(call.raises), last_at: new Date(call.lastAt),
  };
}

/** A row of table `call`. */
export interface CallRow {
  id: Buffer;
  call_key: string;
  scope: Call['scope'];
  lane: number;
  equipment: Call['equipment'];
  safety: Call['safety'];
  lanes_held: number[];
  raised_at: Date;
  received_at: Date;
  raised_by: Call['raisedBy'];
  origin: Call['origin'];
  text: string | null;
  code: string | null;
  status: Call['status'];
  acknowledged_at: Date | null;
  acknowledged_by: NonNullable<Call['acknowledged']>['by'] | null;
  on_lane_at: Date | null;
  on_lane_by: NonNullable<Call['onLane']>['by'] | null;
  parked: Call['parked'];
  out_of_service: Call['outOfService'];
  returned_at: Date | null;
  cleared_at: Date | null;
  cleared_by: NonNullable<Call['cleared']>['by'] | null;
  cause: string | null;
  note: string | null;
  lockout: Call['lockout'];
  stops: Call['stops'];
  steps: Call['steps'];
  raises: Call['raises'];
  last_at: Date;
}

const who = <B>(at: Date | null, by: B | null): { at: number; by: B } | null => (at && by ? { at: at.getTime(), by } : null);

/** A call as the house had it, from its row: for calls that ended before the last cut. */
export function callFromRow(row: CallRow): Call {
  const cleared = who(row.cleared_at, row.cleared_by);
  return {
    id: fromBinary(row.id), key: row.call_key, scope: row.scope, lane: row.lane, equipment: row.equipment, safety: row.safety, lanesHeld: row.lanes_held,
    raisedAt: row.raised_at.getTime(), receivedAt: row.received_at.getTime(), raisedBy: row.raised_by, origin: row.origin, text: row.text, code: row.code,
    status: row.status, acknowledged: who(row.acknowledged_at, row.acknowledged_by), onLane: who(row.on_lane_at, row.on_lane_by), parked: row.parked,
    outOfService: row.out_of_service, returnedAt: row.returned_at?.getTime() ?? null, cleared: cleared && { ...cleared, cause: row.cause ?? '', note: row.note },
    lockout: row.lockout, stops: row.stops, steps: row.steps, raises: row.raises, lastAt: row.last_at.getTime(),
  };
}
