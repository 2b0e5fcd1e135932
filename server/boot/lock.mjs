// One at a time among processes that share a folder.
import fs from 'node:fs';
import path from 'node:path';
import { isAlive, pause, startOf } from './processes.mjs';

const RETRY_MS = 50;

/** This process as a line that a later reader can check with `isHeldBy`. */
export const signature = (pid = process.pid) => `${pid} ${startOf(pid)}`;

/** Does the process that wrote this signature still run? */
export function isHeldBy(text) {
  const [pid, started] = text.split(' ');
  return isAlive(Number(pid)) && startOf(Number(pid)) === (started ?? '');
}

/** Writes the file unless a living process has it; returns the holder's pid, or 0 when it is ours now. */
export function tryLock(file) {
  fs.mkdirSync(path.dirname(file), { recursive: true });
  // Made whole under another name and linked, so that nobody ever reads a half-written holder.
  const mine = `${file}.${process.pid}`;
  fs.writeFileSync(mine, signature());
  try {
    for (;;) {
      try {
        fs.linkSync(mine, file);
        return 0;
      } catch (error) {
        if (error.code !== 'EEXIST') throw error;
        const holder = readHolder(file);
        if (holder !== '' && isHeldBy(holder)) return Number(holder.split(' ')[0]);
        takeAway(file, holder);
      }
    }
  } finally {
    fs.rmSync(mine, { force: true });
  }
}

function readHolder(file) {
  try {
    return fs.readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}

/** Removes a dead holder's file, and only that one: two starters may both have found it dead. */
function takeAway(file, holder) {
  const aside = `${file}.${process.pid}.dead`;
  try {
    fs.renameSync(file, aside);
  } catch {
    return;
  }
  const moved = readHolder(aside);
  if (moved !== holder && moved !== '' && isHeldBy(moved)) fs.linkSync(aside, file);
  fs.rmSync(aside, { force: true });
}

export function unlock(file) {
  if (readHolder(file) === signature()) fs.rmSync(file, { force: true });
}

/** Runs `work` while holding `file`; waits up to `patienceMs` for a living holder, telling `onWait` once. */
export async function withLock(file, work, { patienceMs = 60_000, onWait = () => {} } = {}) {
  const until = Date.now() + patienceMs;
  for (let first = true; ; first = false) {
    const holder = tryLock(file);
    if (holder === 0) break;
    if (first) onWait(holder);
    if (Date.now() > until) throw new Error(`process ${holder} has been holding ${file} for ${patienceMs / 1000} s`);
    await pause(RETRY_MS);
  }
  try {
    return await work();
  } finally {
    unlock(file);
  }
}
