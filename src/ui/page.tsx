import type { ReactNode } from 'react';
import { classes } from './class-names.ts';

/**
 * Frame of a page: a title that says the finding, one lead line, and beside it (below on a phone) what goes with it.
 * Rules and space divide; no cards.
 */
export function Page({ title, lead, actions, aside, children }: { title: ReactNode; lead?: ReactNode; actions?: ReactNode; aside?: ReactNode; children: ReactNode }) {
  return (
    <div className={classes('grid min-h-0 grow', aside ? 'min-[901px]:grid-cols-[minmax(0,1fr)_min(26rem,34vw)]' : 'grid-cols-[minmax(0,1fr)]')}>
      <section className="min-w-0 px-6 pt-6 pb-12 max-[900px]:px-4 max-[900px]:pt-4">
        <header className="mb-5 flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
          <div className="min-w-0">
            <h1 className="type-title text-[2rem] max-[900px]:text-[1.625rem]">{title}</h1>
            {lead ? <p className="mt-1.5 max-w-[68ch] text-dim">{lead}</p> : null}
          </div>
          {actions ? <div className="flex flex-wrap gap-3">{actions}</div> : null}
        </header>
        {children}
      </section>
      {aside ? <aside className="min-w-0 border-rule bg-card px-6 py-6 max-[900px]:border-t max-[900px]:px-4 max-[900px]:pb-12 min-[901px]:border-l">{aside}</aside> : null}
    </div>
  );
}

/** Heading of a part, with a quiet word at its end. */
export function PartTitle({ children, note, className }: { children: ReactNode; note?: ReactNode; className?: string }) {
  return (
    <div className={classes('mb-2 flex items-baseline justify-between gap-3', className)}>
      <h2 className="type-name text-[0.9375rem]">{children}</h2>
      {note ? <span className="type-label">{note}</span> : null}
    </div>
  );
}

/** Nothing here yet: says so in one sentence, and what fills it. */
export function EmptyState({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <div className="border-t border-rule py-8">
      <p className="type-name text-lg">{title}</p>
      {children ? <div className="mt-1 max-w-[60ch] text-dim">{children}</div> : null}
    </div>
  );
}

/** Lines where text will be; `lines` of them. Hidden from screen readers, which hear `label` once. */
export function Skeleton({ lines = 3, label }: { lines?: number; label: string }) {
  return (
    <div role="status" className="flex flex-col gap-3 py-2">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, i) => (
        <span key={i} aria-hidden className="block h-4 animate-pulse rounded-sm bg-rule" style={{ width: `${92 - ((i * 17) % 40)}%` }} />
      ))}
    </div>
  );
}
