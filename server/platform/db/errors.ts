/** Error numbers of MariaDB that the program tells apart (MariaDB Knowledge Base, "MariaDB Error Codes"). */
const DUPLICATE_KEY = 1062;
const DEADLOCK = 1213;
const LOCK_WAIT_TIMEOUT = 1205;
/** "Record has changed since last read": what `innodb_snapshot_isolation=ON` says instead of losing an update. */
const CHANGED_SINCE_READ = 1020;

/** The server is stopping, refuses connections, or ended this one. */
const AWAY_NUMBERS = new Set([1040, 1053, 1927, 4031]);
const AWAY_CODES = new Set([
  'ECONNREFUSED', 'ECONNRESET', 'ENOENT', 'EPIPE', 'ETIMEDOUT', 'EHOSTUNREACH', 'ENOTFOUND', 'PROTOCOL_CONNECTION_LOST',
  'PROTOCOL_ENQUEUE_AFTER_FATAL_ERROR', 'PROTOCOL_SEQUENCE_TIMEOUT',
]);

function property(error: unknown, name: string): unknown {
  return typeof error === 'object' && error !== null ? (error as Record<string, unknown>)[name] : undefined;
}

/** Is this "duplicate entry", and on this key when one is named (`PRIMARY` or the index's name)? */
export function isDuplicate(error: unknown, key?: string): boolean {
  if (property(error, 'errno') !== DUPLICATE_KEY) return false;
  if (key === undefined) return true;
  const named = /for key '(?:[^']*\.)?([^'.]+)'/.exec(String(property(error, 'sqlMessage')))?.[1];
  return named === key;
}

/** Did the transaction lose against another one, so that the same work may succeed when done again? */
export function isLostRace(error: unknown): boolean {
  const errno = property(error, 'errno');
  return errno === DEADLOCK || errno === LOCK_WAIT_TIMEOUT || errno === CHANGED_SINCE_READ;
}

/** Is the database out of reach (the answer to the caller is 503), rather than the statement wrong? */
export function isDatabaseAway(error: unknown): boolean {
  const errno = property(error, 'errno');
  const code = property(error, 'code');
  if (property(error, 'name') === 'KnexTimeoutError') return true;
  if (typeof errno === 'number' && AWAY_NUMBERS.has(errno)) return true;
  if (typeof code === 'string' && AWAY_CODES.has(code)) return true;
  return error instanceof Error && /closed state|Connection lost|pool is destroyed|aborted/i.test(error.message);
}
