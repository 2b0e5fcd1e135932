import type { ReactNode } from 'react';
import type { Selection } from './use-lane-selection.ts';

/** What desk and phone draw the floor with. */
export interface FloorProps {
  selection: Selection;
  panel: ReactNode;
  callAddress: ((call: string) => string) | null;
  sessionAddress: ((session: string) => string) | null;
}
