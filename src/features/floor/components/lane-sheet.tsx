import type { ReactNode } from 'react';
import { Sheet } from '../../../ui/dialog.tsx';

/** The lane's panel from below, on a phone. Its code is fetched with the first lane selected. */
export function LaneSheet({ title, onClose, children }: { title: string; onClose: () => void; children: ReactNode }) {
  return (
    <Sheet open onClose={onClose} title={title} ownHeader>
      {children}
    </Sheet>
  );
}
