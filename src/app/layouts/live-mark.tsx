import { appText, wording } from '#shared/text/en/app.ts';
import { useTimes } from '../../lib/formats.ts';
import { useLiveness } from '../../lib/live.ts';
import { classes } from '../../ui/class-names.ts';

const DOT = { live: 'bg-green', starting: 'ring-2 ring-inset ring-line', reconnecting: 'ring-2 ring-inset ring-amber', stale: 'bg-red' } as const;

/** Live, or as of when: a filled dot, a ring, and always the word. */
export function LiveMark() {
  const { state, since } = useLiveness();
  const { timeWithSeconds } = useTimes();
  return (
    <span role="status" data-live={state} className="flex items-center gap-1.5 whitespace-nowrap text-dim">
      <span aria-hidden className={classes('size-2.5', state === 'stale' ? '' : 'rounded-full', DOT[state])} />
      <span className={state === 'live' ? 'max-[900px]:sr-only' : undefined}>{state === 'stale' && since !== null ? appText.asOf(timeWithSeconds(since)) : wording[state]}</span>
    </span>
  );
}
