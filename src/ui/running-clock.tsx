import { elapsed, spokenElapsed } from '#shared/text/en/formats.ts';
import { useNow } from '../lib/clock.ts';

/** Time since an instant (epoch ms), on the server's clock: 3:12, 47 m, 2 h 05. Not announced at each tick. */
export function RunningClock({ since, className }: { since: number; className?: string }) {
  const past = useNow() - since;
  return (
    <time className={className} aria-label={spokenElapsed(past)} role="timer" aria-live="off">
      {elapsed(past)}
    </time>
  );
}
