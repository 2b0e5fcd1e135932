/** One scheduled task. `jobs/<job>.ts` says its schedule; what it does belongs to a slice. */
export interface Job {
  name: string;
  /** node-cron pattern, seconds first. */
  every: string;
  /** Does what is due at `now` (epoch ms); may be called again for what is done already, and then does nothing. */
  run(now: number): Promise<void>;
}
