import { closeSync, existsSync, fsyncSync, mkdirSync, openSync, readFileSync, renameSync, writeSync } from 'node:fs';
import { dirname } from 'node:path';
import type { DeviceEvent } from './events.ts';

interface Kept {
  /** Events up to this instant have been taken into the spool. */
  until: number;
  /** Sequence number of the next event. */
  next: number;
  waiting: { sequence: number; event: DeviceEvent }[];
}

export interface Spool {
  readonly until: number;
  readonly size: number;
  /** Takes events that have happened; on disk before anything is sent. */
  take(events: readonly DeviceEvent[], until: number): void;
  head(count: number): Kept['waiting'];
  /** Forgets the first `count`: they were acknowledged. */
  drop(count: number): void;
}

/** What a gateway has told nobody yet, kept in one file that is replaced whole, so that a kill loses nothing. */
export function openSpool(file: string, from: number): Spool {
  mkdirSync(dirname(file), { recursive: true });
  let kept: Kept = existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')) as Kept) : { until: from, next: 1, waiting: [] };
  const save = (after: Kept): void => {
    const temporary = `${file}.new`;
    const handle = openSync(temporary, 'w', 0o600);
    writeSync(handle, JSON.stringify(after));
    fsyncSync(handle);
    closeSync(handle);
    renameSync(temporary, file);
    kept = after;
  };
  return {
    get until() {
      return kept.until;
    },
    get size() {
      return kept.waiting.length;
    },
    take(events, until) {
      const added = events.map((event, i) => ({ sequence: kept.next + i, event }));
      save({ until, next: kept.next + added.length, waiting: [...kept.waiting, ...added] });
    },
    head: (count) => kept.waiting.slice(0, count),
    drop(count) {
      save({ ...kept, waiting: kept.waiting.slice(count) });
    },
  };
}
