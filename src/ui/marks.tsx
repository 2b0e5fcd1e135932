import { classes } from './class-names.ts';

/** Marks that stand beside every colour: a triangle asks for a person, a ring has one, a hatch has one inside. */
export type MarkKind = 'unanswered' | 'answered' | 'mechanic-in' | 'out-of-service' | 'parked';

/** Drawn in the text's own colour; decorative, as words or a name stand beside it. */
export function Mark({ kind, size = 14, className }: { kind: MarkKind; size?: number; className?: string }) {
  return (
    <svg aria-hidden viewBox="0 0 16 16" width={size} height={size} className={classes('inline-block shrink-0 align-[-0.1em]', className)}>
      {SHAPE[kind]}
    </svg>
  );
}

const SHAPE = {
  unanswered: <path d="M8 1.2 15.4 14.6H.6z" fill="currentColor" />,
  answered: <circle cx="8" cy="8" r="5.6" fill="none" stroke="currentColor" strokeWidth="3.2" />,
  'mechanic-in': <path d="M1 15 15 1M1 9.5 9.5 1M6.5 15 15 6.5" stroke="currentColor" strokeWidth="2.4" />,
  'out-of-service': <path d="M2 2l12 12M14 2 2 14" stroke="currentColor" strokeWidth="3" />,
  parked: <path d="M4 2.5v11M12 2.5v11" stroke="currentColor" strokeWidth="3.4" />,
} as const;

const TONE = {
  plain: 'bg-cap text-pin',
  unanswered: 'bg-red text-on-red',
  answered: 'bg-amber-fill text-on-amber',
  'mechanic-in': 'hatch text-pin',
  ready: 'bg-green text-on-green',
  /** Waits for something planned: an outline. */
  waits: 'bg-transparent text-ink ring-2 ring-inset ring-amber-fill',
  'at-risk': 'bg-transparent text-ink ring-2 ring-inset ring-amber-fill',
  /** Keeps the session from being ready: solid. */
  holds: 'bg-red text-on-red',
  outline: 'bg-transparent text-ink ring-2 ring-inset ring-line',
} as const;
export type BadgeTone = keyof typeof TONE;

/** A lane's number as the house paints it: square foot, round head. `size` in px of the figure. */
export function LaneBadge({ lane, tone = 'plain', size = 22, className }: { lane: number | string; tone?: BadgeTone; size?: number; className?: string }) {
  return (
    <span
      className={classes('type-number inline-grid place-items-center rounded-t-[0.28em] rounded-b-[0.08em]', TONE[tone], className)}
      style={{ fontSize: size, minWidth: '1.9em', height: '1.7em', paddingInline: '0.25em' }}
    >
      {lane}
    </span>
  );
}

export type PipState = 'ok' | 'waits' | 'at-risk' | 'holds';
const PIP: Record<PipState, string> = {
  ok: 'bg-green',
  waits: 'ring-2 ring-inset ring-line',
  'at-risk': 'ring-2 ring-inset ring-amber-fill',
  holds: 'bg-red',
};

/** One mark a lane of a session: filled is settled (green ready, red holds), an outline waits. `label` says it in words. */
export function Pips({ states, label, className }: { states: readonly PipState[]; label: string; className?: string }) {
  return (
    <span role="img" aria-label={label} className={classes('flex gap-1', className)}>
      {states.map((state, i) => (
        <span key={i} className={classes('h-2 min-w-1 grow rounded-[2px]', PIP[state], state === 'holds' && 'h-3 -mt-0.5')} />
      ))}
    </span>
  );
}
