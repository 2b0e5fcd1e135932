import type { FloorDelta } from '../contracts/floor.ts';
import type { Permission } from '../policy/policy.ts';

/** What a hint can be about; also the second part of every query key: `[centre, topic, …]`. */
export const TOPICS = ['floor', 'calls', 'runs', 'patterns', 'leagues', 'sessions', 'figures', 'settings'] as const;
export type Topic = (typeof TOPICS)[number];

export interface Heartbeat {
  epoch: string;
  /** Last sequence number that was sent to the board. */
  seq: number;
  at: number;
  database: 'ok' | 'away';
  gatewaysHeardAt: number | null;
}

/** Server → client, complete: name → payload, room and what it is for. The socket is a hint, HTTP is the truth. */
export interface ServerEvents {
  'floor.delta': FloorDelta;
  /** Something of these topics changed: fetch again what is on screen. */
  hint: { seq: number; topics: Topic[] };
  heartbeat: Heartbeat;
  /** This client fell behind or the server restarts: fetch the snapshot. */
  resync: { reason: 'slow' | 'restart' | 'epoch' };
}

export type Room = 'floor' | 'staff' | 'league';

/** Rooms are joined by the server through the policy table only. `league:<id>` is a secretary's own. */
export const ROOMS: Record<Room, { permission: Permission; events: (keyof ServerEvents)[] }> = {
  floor: { permission: 'floor.see', events: ['floor.delta', 'heartbeat', 'resync'] },
  staff: { permission: 'call.see', events: ['hint'] },
  league: { permission: 'readiness.see', events: ['hint'] },
};

export const roomName = (room: Room, centre: string, league?: string): string => (league ? `${room}:${centre}:${league}` : `${room}:${centre}`);

/** Client → server: the one message, sent after connecting; answered with the rooms joined. */
export interface ClientEvents {
  watch: (ask: { centre: string }, answer: (reply: { ok: boolean; code?: string; rooms: string[] }) => void) => void;
}

/** The client's targets: the board's store, or the query cache by topic. */
export const TARGETS: Record<keyof ServerEvents, 'board' | 'query'> = { 'floor.delta': 'board', hint: 'query', heartbeat: 'board', resync: 'board' };
