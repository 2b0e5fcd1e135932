/** Writes the file unless a living process has it; returns the holder's pid, or 0 when it is ours now. */
export function tryLock(file: string): number;
export function unlock(file: string): void;
/** Runs `work` while holding `file`; waits for a living holder. */
export function withLock<T>(file: string, work: () => Promise<T>, options?: { patienceMs?: number }): Promise<T>;
