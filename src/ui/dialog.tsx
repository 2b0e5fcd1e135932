import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { wording } from '#shared/text/en/app.ts';
import { classes } from './class-names.ts';

interface Props {
  open: boolean;
  onClose: () => void;
  title: string;
  /** One line under the title; read out with it. */
  lead?: ReactNode;
  children: ReactNode;
  /** Buttons at the end, the main one last. */
  actions?: ReactNode;
  /** The content has its own heading and close button: the title is only read out. */
  ownHeader?: boolean;
}

const veil = 'fixed inset-0 z-40 bg-[color-mix(in_srgb,var(--deck)_55%,transparent)]';

/** In the middle of the page, for what must be settled first. Escape and the veil close it. */
export function Dialog(props: Props) {
  return <Panel {...props} className="inset-x-4 top-[8dvh] mx-auto max-h-[84dvh] max-w-xl rounded-lg" />;
}

/** From the right on a desk, from below on a phone. */
export function Sheet(props: Props) {
  return (
    <Panel
      {...props}
      className="inset-y-0 right-0 w-[min(30rem,100vw)] border-l border-rule max-[900px]:inset-x-0 max-[900px]:top-auto max-[900px]:max-h-[90dvh] max-[900px]:w-full max-[900px]:rounded-t-xl max-[900px]:border-t max-[900px]:border-l-0"
    />
  );
}

function Panel({ open, onClose, title, lead, children, actions, ownHeader = false, className }: Props & { className: string }) {
  return (
    <Radix.Root open={open} onOpenChange={(next) => (next ? undefined : onClose())}>
      <Radix.Portal>
        <Radix.Overlay className={veil} />
        <Radix.Content {...(lead ? {} : { 'aria-describedby': undefined })} className={classes('fixed z-50 flex flex-col gap-4 overflow-y-auto bg-paper p-6 text-ink', className)}>
          {ownHeader ? <Radix.Title className="sr-only">{title}</Radix.Title> : <Head title={title} lead={lead} />}
          <div className="flex flex-col gap-4">{children}</div>
          {actions ? <footer className="mt-auto flex flex-wrap justify-end gap-3 pt-2 max-[900px]:[&>*]:grow">{actions}</footer> : null}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

function Head({ title, lead }: { title: string; lead: ReactNode }) {
  return (
    <header className="flex items-start justify-between gap-4">
      <div>
        <Radix.Title className="type-title text-2xl">{title}</Radix.Title>
        {lead ? <Radix.Description className="mt-1 text-dim">{lead}</Radix.Description> : null}
      </div>
      <Radix.Close className="grid size-9 shrink-0 place-items-center rounded-md text-xl leading-none hover:bg-card max-[900px]:size-12" aria-label={wording.close}>
        ×
      </Radix.Close>
    </header>
  );
}
