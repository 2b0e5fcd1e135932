import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { classes } from './class-names.ts';

const KIND = {
  primary: 'bg-ink text-paper hover:bg-[color-mix(in_srgb,var(--ink)_86%,var(--paper))]',
  secondary: 'bg-transparent text-ink ring-2 ring-inset ring-ink hover:bg-card',
  quiet: 'bg-transparent text-ink hover:bg-card underline decoration-rule decoration-2 underline-offset-4 hover:decoration-ink',
  danger: 'bg-red text-on-red hover:bg-[color-mix(in_srgb,var(--red)_86%,var(--ink))]',
} as const;
/** `desk` for pointer and keyboard, `hand` (48 px) for a thumb. On a phone every button is at least `hand`. */
const SIZE = {
  desk: 'min-h-9 px-3.5 text-[0.9375rem] max-[900px]:min-h-hand max-[900px]:px-5',
  hand: 'min-h-hand px-5 text-[1.0625rem]',
} as const;

interface Look {
  kind?: keyof typeof KIND;
  size?: keyof typeof SIZE;
}

/** Looks of a button for what isn't one: `<Link className={buttonLook({kind: 'secondary'})}>`. */
export function buttonLook({ kind = 'secondary', size = 'desk' }: Look = {}): string {
  return classes(
    'inline-flex items-center justify-center gap-2 rounded-md font-[650] whitespace-nowrap select-none transition-colors duration-150',
    'disabled:opacity-45 disabled:cursor-not-allowed aria-disabled:opacity-45',
    KIND[kind],
    SIZE[size],
  );
}

/** Says what happens ("Open lane 7"). `busy` keeps its width and takes no second press. */
export function Button({ kind, size, busy = false, className, children, ...rest }: Look & { busy?: boolean; children: ReactNode } & ButtonHTMLAttributes<HTMLButtonElement>) {
  return (
    <button type="button" {...rest} disabled={rest.disabled ?? busy} aria-busy={busy || undefined} className={classes(buttonLook({ kind, size }), busy && 'animate-pulse', className)}>
      {children}
    </button>
  );
}

/** A picture that beats a word, with its word for those who don't see it. */
export function IconButton({ label, className, children, ...rest }: { label: string; children: ReactNode } & ButtonHTMLAttributes<HTMLButtonElement>) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      {...rest}
      className={classes('inline-flex size-9 items-center justify-center rounded-md text-ink hover:bg-card max-[900px]:size-12', className)}
    >
      {children}
    </button>
  );
}
