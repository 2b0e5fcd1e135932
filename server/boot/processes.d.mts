/** Is there such a process, whoever owns it? */
export function isAlive(pid: number): boolean;
/** Sends TERM, then KILL after `patienceMs`; resolves when the process is gone. */
export function endProcess(pid: number, patienceMs: number): Promise<void>;
/** A TCP port on loopback that was free a moment ago. */
export function freePort(): Promise<number>;
