import { pino, type DestinationStream, type Logger } from 'pino';

/** Where a secret may turn up in a line: request and response headers, bodies, and one level of either. */
const SECRETS = [
  'password', '*.password', '*.*.password', 'key', '*.key', 'token', '*.token',
  'headers.cookie', 'headers.authorization', '*.headers.cookie', '*.headers.authorization', '*.headers["set-cookie"]',
  '*.headers["idempotency-key"]',
];

export type { Logger };

/** The log: JSON lines on standard output (or `destination`), secrets struck out. `level` as pino names them. */
export function createLog(level: string, destination?: DestinationStream): Logger {
  const options = { level, base: undefined, redact: { paths: SECRETS, censor: '[struck out]' } };
  return destination === undefined ? pino(options) : pino(options, destination);
}
