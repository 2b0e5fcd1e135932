import type { LaneReadiness } from '#shared/domain/readiness/lane.ts';
import type { Because, Shown, Worse } from '#shared/domain/readiness/confirmation.ts';
import type { SessionVerdict } from '#shared/domain/readiness/session.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';
import { fromBinary, toBinary } from '#server/platform/db/uuid.ts';

/** The last verdict of a session, as kept. Instants in ms. */
export interface KeptVerdict {
  session: string;
  verdict: SessionVerdict;
  since: number;
  lanes: LaneReadiness[];
  transitions: { at: number; verdict: SessionVerdict }[];
  frozenAt: number | null;
  told: { held60At: number | null; held30At: number | null; readyAt: number | null };
}

export interface VerdictRow {
  centre_id: Buffer;
  session_id: Buffer;
  verdict: SessionVerdict;
  since: Date;
  lanes: LaneReadiness[];
  transitions: { at: number; verdict: SessionVerdict }[];
  frozen_at: Date | null;
  told_held_60_at: Date | null;
  told_held_30_at: Date | null;
  told_ready_at: Date | null;
}

export const verdictOfRow = (row: VerdictRow): KeptVerdict => ({
  session: fromBinary(row.session_id), verdict: row.verdict, since: fromRowTime(row.since), lanes: row.lanes, transitions: row.transitions, frozenAt: fromRowTime(row.frozen_at),
  told: { held60At: fromRowTime(row.told_held_60_at), held30At: fromRowTime(row.told_held_30_at), readyAt: fromRowTime(row.told_ready_at) },
});

export const verdictToRow = (centreId: Buffer, kept: KeptVerdict) => ({
  centre_id: centreId, session_id: toBinary(kept.session), verdict: kept.verdict, since: toRowTime(kept.since), lanes: JSON.stringify(kept.lanes),
  transitions: JSON.stringify(kept.transitions), frozen_at: toRowTime(kept.frozenAt), told_held_60_at: toRowTime(kept.told.held60At),
  told_held_30_at: toRowTime(kept.told.held30At), told_ready_at: toRowTime(kept.told.readyAt),
});

export interface Confirmation {
  id: string;
  session: string;
  by: string;
  at: number;
  shown: Shown;
  worse: Worse;
  reopened: { at: number; because: Because } | null;
}

export interface ConfirmationRow {
  centre_id: Buffer;
  id: Buffer;
  session_id: Buffer;
  user_id: Buffer;
  user_name: string;
  confirmed_at: Date;
  shown: Shown;
  shown_sha256: string;
  worse: Worse;
  reopened_at: Date | null;
  reopened_because: Because | null;
}

export const confirmationOfRow = (row: ConfirmationRow): Confirmation => ({
  id: fromBinary(row.id), session: fromBinary(row.session_id), by: row.user_name, at: fromRowTime(row.confirmed_at), shown: row.shown, worse: row.worse,
  reopened: row.reopened_at && row.reopened_because ? { at: fromRowTime(row.reopened_at), because: row.reopened_because } : null,
});

export interface Concern {
  id: string;
  session: string;
  by: string;
  at: number;
  text: string;
  lane: number | null;
  settled: { by: string; at: number; note: string } | null;
}

export interface ConcernRow {
  centre_id: Buffer;
  id: Buffer;
  session_id: Buffer;
  user_name: string;
  raised_at: Date;
  text: string;
  lane: number | null;
  settled_at: Date | null;
  settled_by: string | null;
  settled_note: string | null;
}

export const concernOfRow = (row: ConcernRow): Concern => ({
  id: fromBinary(row.id), session: fromBinary(row.session_id), by: row.user_name, at: fromRowTime(row.raised_at), text: row.text, lane: row.lane,
  settled: row.settled_at ? { by: row.settled_by ?? '', at: fromRowTime(row.settled_at), note: row.settled_note ?? '' } : null,
});
