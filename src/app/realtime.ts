import type { QueryClient } from '@tanstack/react-query';
import { io, type Socket } from 'socket.io-client';
import { type ClientEvents, type Heartbeat, type ServerEvents, TARGETS, type Topic } from '#shared/realtime/events.ts';
import type { BoardStore } from '../features/floor/index.ts';
import { heardServerTime } from '../lib/clock.ts';
import { heardWord, linkCut } from '../lib/live.ts';

const HINT_MS = 500;
/** What follows from time alone no event tells: a gateway gone silent, a league that begins, a film that ages. */
const TIME_PASSES_MS = 20_000;
const REJOIN_MS = 2000;

type Wire = Socket<{ [E in keyof ServerEvents]: (payload: ServerEvents[E]) => void }, ClientEvents>;

/** What each event does here. The socket is a hint: the board fetches its snapshot and queries fetch again over HTTP. */
function handlers(board: BoardStore, hint: (topics: readonly Topic[]) => void): { [E in keyof ServerEvents]: (payload: ServerEvents[E]) => void } {
  return {
    'floor.delta': (delta) => {
      heardServerTime(delta.at);
      board.delta(delta);
    },
    'heartbeat': (beat: Heartbeat) => {
      heardServerTime(beat.at);
      heardWord(beat.at, beat.database);
      board.heartbeat(beat);
    },
    'resync': () => board.resync(),
    'hint': ({ topics }) => hint(topics),
  };
}

/** Gathers hints for half a second, then has the queries of those topics fetched again where they are on screen. */
function hintGate(invalidate: (topic: Topic) => void): (topics: readonly Topic[]) => void {
  const waiting = new Set<Topic>();
  let timer: ReturnType<typeof setTimeout> | null = null;
  return (topics) => {
    for (const topic of topics) waiting.add(topic);
    timer ??= setTimeout(() => {
      timer = null;
      for (const topic of waiting) invalidate(topic);
      waiting.clear();
    }, HINT_MS);
  };
}

/**
 * Joins the centre's rooms, and again after whatever socket.io doesn't come back from by itself: a database that was away when the
 * server asked who we are, or a connection that the server ended (the snapshot's answer says whether the sign-in was revoked).
 */
function keepJoined(socket: Wire, centre: string, board: BoardStore): () => void {
  let timer: ReturnType<typeof setTimeout> | undefined;
  const later = (what: () => void) => {
    clearTimeout(timer);
    timer = setTimeout(what, REJOIN_MS);
  };
  const watch = () => {
    if (socket.connected) socket.emit('watch', { centre }, ({ ok, code }) => (!ok && code === 'database.away' ? later(watch) : undefined));
  };
  socket.on('connect', watch);
  socket.on('disconnect', (reason) => {
    linkCut();
    if (reason !== 'io server disconnect') return;
    board.resync();
    later(() => socket.connect());
  });
  socket.on('connect_error', () => {
    if (socket.active) return;
    board.resync();
    later(() => socket.connect());
  });
  return () => clearTimeout(timer);
}

/**
 * Keeps one centre live: one socket, one loop over the events. Gives what ends it. After each connect, and whenever the page
 * is seen again, the board compares itself with the server by fetching the snapshot.
 */
export function connect(centre: string, board: BoardStore, queries: QueryClient): () => void {
  const invalidate = (topic: Topic) => void queries.invalidateQueries({ queryKey: [centre, topic] });
  const socket: Wire = io({ transports: ['websocket', 'polling'], reconnectionDelay: 500, reconnectionDelayMax: 4000, randomizationFactor: 0.5, autoConnect: false });
  const loop = handlers(board, hintGate(invalidate));
  for (const event of Object.keys(TARGETS) as (keyof ServerEvents)[]) socket.on(event, loop[event]);
  let connectedBefore = false;
  socket.on('connect', () => {
    board.resync();
    if (connectedBefore) void queries.invalidateQueries({ queryKey: [centre] });
    connectedBefore = true;
  });
  const leave = keepJoined(socket, centre, board);
  socket.io.on('reconnect_attempt', linkCut);
  socket.connect();
  board.resync();

  const seenAgain = () => {
    if (document.visibilityState === 'hidden') return;
    board.resync();
    if (!socket.connected) socket.connect();
  };
  const timePasses = setInterval(() => (document.visibilityState === 'visible' && socket.connected ? board.resync() : undefined), TIME_PASSES_MS);
  document.addEventListener('visibilitychange', seenAgain);
  window.addEventListener('pageshow', seenAgain);
  window.addEventListener('online', seenAgain);
  return () => {
    clearInterval(timePasses);
    leave();
    document.removeEventListener('visibilitychange', seenAgain);
    window.removeEventListener('pageshow', seenAgain);
    window.removeEventListener('online', seenAgain);
    socket.close();
  };
}
