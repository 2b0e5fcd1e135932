import { Writable } from 'node:stream';
import { createLog, type Logger } from '#server/platform/log.ts';

/** A log that keeps what the server complained of, so that a test that meets a 500 can say why. */
export function complaints(): { log: Logger; said: string[] } {
  const said: string[] = [];
  const sink = new Writable({
    write(line: Buffer, _encoding, done) {
      const { msg, err } = JSON.parse(line.toString()) as { msg: string; err?: { message: string; stack: string } };
      if (err) said.push(`${msg}: ${err.message}\n${err.stack}`);
      done();
    },
  });
  return { log: createLog('error', sink), said };
}
