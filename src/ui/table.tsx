import type { HTMLAttributes, ReactNode, TdHTMLAttributes, ThHTMLAttributes } from 'react';
import { classes } from './class-names.ts';

/** A table that scrolls sideways by itself when it must, with its caption for screen readers. Rows are divided by rules. */
export function Table({ caption, children, className }: { caption: string; children: ReactNode; className?: string }) {
  return (
    // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- what scrolls must be reachable by keyboard (WCAG 2.1.1)
    <div className="overflow-x-auto" tabIndex={0} role="group" aria-label={caption}>
      <table className={classes('w-full border-collapse text-left', className)}>
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </div>
  );
}

export function Th({ number = false, className, ...rest }: { number?: boolean } & ThHTMLAttributes<HTMLTableCellElement>) {
  return <th scope="col" {...rest} className={classes('type-label py-1.5 pr-4 font-[560] whitespace-nowrap', number && 'text-right', className)} />;
}

/** `number` sets tabular figures to the right. */
export function Td({ number = false, className, ...rest }: { number?: boolean } & TdHTMLAttributes<HTMLTableCellElement>) {
  return <td {...rest} className={classes('border-t border-rule py-2.5 pr-4 align-baseline', number && 'text-right font-[620]', className)} />;
}

/** A list of terms and what they are, two columns: figures with their unit. */
export function Facts({ children, className, ...rest }: HTMLAttributes<HTMLDListElement>) {
  return (
    <dl {...rest} className={classes('grid grid-cols-2 gap-x-5', className)}>
      {children}
    </dl>
  );
}

export function Fact({ term, children, note }: { term: string; children: ReactNode; note?: ReactNode }) {
  return (
    <div className="border-t border-rule py-2">
      <dt className="type-label">{term}</dt>
      <dd className="type-number mt-0.5 text-[1.6875rem] leading-tight">
        {children}
        {note ? <small className="ml-1 inline-block whitespace-nowrap text-sm font-[500] text-dim [font-stretch:94%]">{note}</small> : null}
      </dd>
    </div>
  );
}
