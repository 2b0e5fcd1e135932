import type { Server as HttpServer } from 'node:http';
import { Server, type Socket } from 'socket.io';
import type { Actor } from '#shared/policy/policy.ts';
import type { ClientEvents, ServerEvents } from '#shared/realtime/events.ts';
import { isSameSite } from '../http/cross-site.ts';
import type { CentreRef } from '../http/route.ts';
import type { Logger } from '../log.ts';
import { roomsFor } from './rooms.ts';

/** Half-open links are noticed within nine seconds; the defaults take 45. */
const PING = { pingInterval: 5_000, pingTimeout: 4_000 };
const MESSAGE_MAX = 64 * 1024;
/** A session is looked at again this often while its socket lives; a revoked one is cut at once. */
const CHECK_EVERY_MS = 10 * 60_000;
/** Packets that wait for a slow client before it is told to fetch the snapshot instead. */
const BACKLOG_MAX = 40;

type Events = { [E in keyof ServerEvents]: (payload: ServerEvents[E]) => void };
interface Known {
  actor: Actor;
  handle: string | null;
  centre: string | null;
  behind: boolean;
}
type Client = Socket<ClientEvents, Events, Record<string, never>, Known>;

export interface HubDeps {
  /** Who sends this Cookie header; `handle` names the sign-in or link. */
  identify: (cookies: string | undefined) => Promise<{ actor: Actor; handle: string | null }>;
  centreBySlug: (slug: string) => Promise<CentreRef | null>;
  publicUrl: string | null;
  log: Logger;
}

export interface Hub {
  emit<E extends keyof ServerEvents>(room: string, event: E, payload: ServerEvents[E]): void;
  /** Centres that somebody watches, by slug. */
  watched(): Set<string>;
  /** Ends the sockets of a sign-in or link. */
  disconnect(handle: string): void;
  /** Tells everybody to fetch again, and closes. */
  stop(): Promise<void>;
}

/** The sockets. Nobody else says `on` or `emit`; rooms are joined through the policy table only. */
export function createHub(server: HttpServer, deps: HubDeps): Hub {
  const own = deps.publicUrl === null ? null : new URL(deps.publicUrl).origin;
  const io = new Server<ClientEvents, Events, Record<string, never>, Known>(server, {
    ...PING, transports: ['websocket', 'polling'], perMessageDeflate: false, httpCompression: false, maxHttpBufferSize: MESSAGE_MAX, serveClient: false,
    allowRequest: (request, answer) => answer(null, isSameSite(request, own)),
  });
  io.use((socket, next) => {
    deps.identify(socket.handshake.headers.cookie).then(({ actor, handle }) => {
      if (actor.kind === 'nobody') return next(new Error('session.required'));
      Object.assign(socket.data, { actor, handle, centre: null, behind: false } satisfies Known);
      next();
    }, (error: unknown) => {
      deps.log.debug({ err: error }, 'a socket could not be identified');
      next(new Error('database.away'));
    });
  });
  io.on('connection', (socket) => {
    if (socket.data.handle) void socket.join(`by:${socket.data.handle}`);
    socket.on('watch', (ask, answer) => void watch(socket, ask, answer, deps));
  });
  const checking = setInterval(() => {
    for (const socket of io.sockets.sockets.values()) void check(socket, deps);
  }, CHECK_EVERY_MS);
  checking.unref();

  return {
    emit(room, event, payload) {
      for (const id of io.sockets.adapter.rooms.get(room) ?? []) {
        const socket = io.sockets.sockets.get(id);
        if (socket && fallsBehind(socket)) void socket.leave(room);
      }
      // The types of one event can't be told apart by a type parameter; `ServerEvents` holds them together.
      (io.to(room) as unknown as { emit(event: string, payload: unknown): void }).emit(event, payload);
    },
    watched: () => new Set([...io.sockets.sockets.values()].flatMap((socket) => socket.data.centre ?? [])),
    disconnect: (handle) => io.in(`by:${handle}`).disconnectSockets(true),
    async stop() {
      clearInterval(checking);
      io.emit('resync', { reason: 'restart' });
      await io.close();
    },
  };
}

async function watch(socket: Client, ask: unknown, answer: unknown, deps: HubDeps): Promise<void> {
  const reply = typeof answer === 'function' ? (answer as Parameters<ClientEvents['watch']>[1]) : () => undefined;
  const slug = typeof ask === 'object' && ask !== null ? (ask as { centre?: unknown }).centre : undefined;
  try {
    const rooms = typeof slug === 'string' ? roomsFor(socket.data.actor, slug) : [];
    const centre = rooms.length > 0 && typeof slug === 'string' ? await deps.centreBySlug(slug) : null;
    if (!centre) return reply({ ok: false, code: 'centre.unknown', rooms: [] });
    for (const room of socket.rooms) if (room !== socket.id && !room.startsWith('by:')) await socket.leave(room);
    await socket.join(rooms);
    socket.data.centre = centre.slug;
    reply({ ok: true, rooms });
  } catch (error) {
    deps.log.debug({ err: error }, 'a socket could not watch');
    reply({ ok: false, code: 'database.away', rooms: [] });
  }
}

/** The sign-in may have ended, or its rights changed: rooms that aren't its any more are left. */
async function check(socket: Client, deps: HubDeps): Promise<void> {
  // Whom the database can't name just now stays who it was; the next look decides.
  const now = await deps.identify(socket.handshake.headers.cookie).catch(() => null);
  if (!now) return;
  if (now.actor.kind === 'nobody' || now.handle !== socket.data.handle) return void socket.disconnect(true);
  socket.data.actor = now.actor;
  const allowed = new Set(socket.data.centre ? roomsFor(now.actor, socket.data.centre) : []);
  for (const room of socket.rooms) if (room !== socket.id && !room.startsWith('by:') && !allowed.has(room)) await socket.leave(room);
}

/** A client that doesn't read as fast as we write gets no queue: it leaves the room, and once it has caught up it is told to fetch again. */
function fallsBehind(socket: Client): boolean {
  // engine.io keeps what the transport hasn't taken yet here; its type calls that private.
  const { writeBuffer } = socket.conn as unknown as { writeBuffer: readonly unknown[] };
  if (socket.data.behind || writeBuffer.length <= BACKLOG_MAX) return socket.data.behind;
  socket.data.behind = true;
  socket.conn.once('drain', () => {
    socket.data.behind = false;
    if (socket.data.centre) void socket.join(roomsFor(socket.data.actor, socket.data.centre));
    socket.emit('resync', { reason: 'slow' });
  });
  return true;
}
