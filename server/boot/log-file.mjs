// The server's log goes to a file, so that the terminal keeps to what people need.
import fs from 'node:fs';
import path from 'node:path';

const LARGEST_BYTES = 20 * 1024 * 1024;
const TAIL_BYTES = 8_192;

/** Opens `server.log` for appending; one that has grown large is kept as `server.log.1`. Returns `{file, fd}`. */
export function openLog(dataDir) {
  const file = path.join(dataDir, 'server.log');
  const size = fs.statSync(file, { throwIfNoEntry: false })?.size ?? 0;
  if (size > LARGEST_BYTES) fs.renameSync(file, `${file}.1`);
  return { file, fd: fs.openSync(file, 'a', 0o600) };
}

/** The last lines of a log, for a message about what stopped. */
export function endOfLog(file, lines = 20) {
  const text = fs.readFileSync(file);
  return text.subarray(Math.max(0, text.length - TAIL_BYTES)).toString('utf8').trimEnd().split('\n').slice(-lines).join('\n');
}
