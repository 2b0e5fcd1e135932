import { useEffect, useState, useSyncExternalStore } from 'react';
import { wording } from '#shared/text/en/app.ts';

interface Shown {
  id: number;
  text: string;
  undo: (() => void) | null;
}

/** How long a message stays when nobody points at it. With an undo it stays longer, and always while it has the focus. */
const PLAIN_MS = 5000;
const UNDO_MS = 12_000;

let shown: readonly Shown[] = [];
let next = 1;
const listeners = new Set<() => void>();
function set(toasts: readonly Shown[]): void {
  shown = toasts;
  for (const listener of listeners) listener();
}
const dismiss = (id: number): void => set(shown.filter((t) => t.id !== id));

/** Says what has happened, at the foot of the page; `undo` where the act has a counter-act. At most three at once. */
export function showToast(text: string, undo?: () => void): void {
  set([...shown, { id: next++, text, undo: undo ?? null }].slice(-3));
}

/** Stands once in the layout. */
export function ToastRegion() {
  const toasts = useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => shown,
  );
  return (
    <div role="status" className="pointer-events-none fixed inset-x-0 bottom-5 z-30 flex flex-col items-center gap-2 px-4 max-[900px]:bottom-24">
      {toasts.map((toast) => (
        <ToastLine key={toast.id} toast={toast} />
      ))}
    </div>
  );
}

function ToastLine({ toast }: { toast: Shown }) {
  const [held, setHeld] = useState(false);
  useEffect(() => {
    if (held) return undefined;
    const timer = setTimeout(() => dismiss(toast.id), toast.undo ? UNDO_MS : PLAIN_MS);
    return () => clearTimeout(timer);
  }, [held, toast]);
  const hold = { onPointerEnter: () => setHeld(true), onPointerLeave: () => setHeld(false), onFocus: () => setHeld(true), onBlur: () => setHeld(false) };
  return (
    <div {...hold} className="pointer-events-auto flex min-h-11 items-center gap-4 rounded-md bg-ink py-1 pr-1.5 pl-4 text-paper">
      <span>{toast.text}</span>
      {toast.undo ? (
        <button
          type="button"
          className="min-h-9 rounded px-3 font-[700] underline underline-offset-4 max-[900px]:min-h-hand"
          onClick={() => {
            toast.undo?.();
            dismiss(toast.id);
          }}
        >
          {wording.undo}
        </button>
      ) : null}
      <button type="button" aria-label={wording.dismiss} className="grid size-9 place-items-center rounded text-lg max-[900px]:size-12" onClick={() => dismiss(toast.id)}>
        ×
      </button>
    </div>
  );
}
