import type { ReactNode } from 'react';
import { classes } from './class-names.ts';

const TONE = {
  /** Somebody must act. */
  red: 'bg-red text-on-red',
  amber: 'bg-amber-fill text-on-amber',
  ink: 'bg-ink text-paper',
  plain: 'border-y border-rule bg-card text-ink',
} as const;

/** A line across the page. `red` and `amber` are announced at once, the rest when the reader is free. */
export function Banner({ tone = 'plain', title, children, action, className }: { tone?: keyof typeof TONE; title: ReactNode; children?: ReactNode; action?: ReactNode; className?: string }) {
  const urgent = tone === 'red' || tone === 'amber';
  return (
    <div role={urgent ? 'alert' : 'status'} className={classes('flex flex-wrap items-center justify-between gap-x-6 gap-y-2 px-6 py-2.5 max-[900px]:px-4', TONE[tone], className)}>
      <div className="min-w-0">
        <strong className="font-[700]">{title}</strong>
        {children ? <span className="ml-2">{children}</span> : null}
      </div>
      {action ?? null}
    </div>
  );
}

/** A refusal as a sentence beside the control that was pressed. Empty: nothing, but the place stays announced. */
export function Refused({ children }: { children: ReactNode }) {
  return (
    <p role="alert" className="font-[620] text-red empty:hidden">
      {children}
    </p>
  );
}
