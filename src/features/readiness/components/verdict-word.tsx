import type { SessionVerdict } from '#shared/domain/readiness/session.ts';
import { verdictNames } from '#shared/text/en/readiness.ts';
import { classes } from '../../../ui/class-names.ts';

const TONE: Record<SessionVerdict, string> = {
  ready: 'bg-green text-on-green', planned: 'ring-2 ring-inset ring-line', 'at-risk': 'ring-2 ring-inset ring-amber-fill', held: 'bg-red text-on-red',
};

/** The verdict in a word: filled when settled, an outline while it waits. */
export function VerdictWord({ verdict }: { verdict: SessionVerdict }) {
  return <span className={classes('inline-block rounded-sm px-2.5 py-1 text-sm font-[680] whitespace-nowrap', TONE[verdict])}>{verdictNames[verdict]}</span>;
}
