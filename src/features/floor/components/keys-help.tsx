import { lazy, Suspense } from 'react';

const Content = lazy(() => import('./keys-help-dialog.tsx').then((m) => ({ default: m.KeysHelpDialog })));

/** The keys of the floor. Its code is fetched when somebody first asks. */
export function KeysHelp({ open, onClose }: { open: boolean; onClose: () => void }) {
  return open ? (
    <Suspense fallback={null}>
      <Content onClose={onClose} />
    </Suspense>
  ) : null;
}
