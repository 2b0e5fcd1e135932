import { setTimeout as sleep } from 'node:timers/promises';
import { cloudEvent } from './events.ts';
import type { Spool } from './spool.ts';

const BATCH = 400;
const LONGEST_WAIT_MS = 30_000;

export interface Line {
  /** Where the public ingest API listens. */
  url: string;
  key: string;
  /** How far the gateway's own clock is ahead of true time. */
  skewMs: number;
}

/** Sends what waits, oldest first, until nothing is left. What wasn't acknowledged stays and is sent again, with growing pauses. */
export async function sendAll(spool: Spool, line: Line, stop: AbortSignal): Promise<void> {
  let wait = 500;
  while (spool.size > 0 && !stop.aborted) {
    const batch = spool.head(BATCH);
    const answer = await post(line, batch.map(({ event, sequence }) => cloudEvent(event, sequence, line.skewMs)), stop);
    if (answer.taken) {
      spool.drop(batch.length);
      wait = 500;
      continue;
    }
    await pause(answer.retryAfterMs ?? wait, stop);
    wait = Math.min(LONGEST_WAIT_MS, wait * 2);
  }
}

type Answer = { taken: true } | { taken: false; retryAfterMs: number | null };

/** Waits, but not beyond the order to stop. */
export const pause = (ms: number, stop: AbortSignal): Promise<void> => sleep(ms, undefined, { signal: stop }).catch(() => undefined);

async function post(line: Line, events: readonly Record<string, unknown>[], stop: AbortSignal): Promise<Answer> {
  try {
    const response = await fetch(`${line.url}/api/ingest/events`, {
      method: 'POST',
      headers: {
        'authorization': `Bearer ${line.key}`,
        'content-type': 'application/cloudevents-batch+json',
        'gateway-time': new Date(Date.now() + line.skewMs).toISOString(),
      },
      body: JSON.stringify(events),
      signal: AbortSignal.any([AbortSignal.timeout(15_000), stop]),
    });
    const text = await response.text();
    if (response.ok) {
      const { setAside } = JSON.parse(text) as { setAside: { id: string; reason: string }[] };
      for (const { id, reason } of setAside) console.error(`set aside: ${id}: ${reason}`);
      return { taken: true };
    }
    if (response.status === 401 || response.status === 403) throw new Error(`The key was refused (${response.status}).`);
    const seconds = Number(response.headers.get('retry-after'));
    return { taken: false, retryAfterMs: seconds > 0 ? seconds * 1000 : null };
  } catch (error) {
    if (error instanceof TypeError || stop.aborted || (error as Error).name === 'TimeoutError') return { taken: false, retryAfterMs: null };
    throw error;
  }
}
