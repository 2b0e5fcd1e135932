import type { SessionNight } from '#shared/domain/numbers/night/input.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

/** What figures ask of other slices; compose.ts joins their front doors to it. */
export interface NumbersSources {
  /** Sessions that have lanes within a span of time, cancelled ones left out. */
  sessions(centre: CentreRef, from: number, to: number): Promise<SessionNight[]>;
  /** Of the league sessions whose warm-up lies in the span: how many were ready then. */
  readyAtWarmUp(centre: CentreRef, from: number, to: number): Promise<{ ready: number; of: number }>;
  /** Opening hours, Monday first, minutes after local midnight. */
  opening(centre: CentreRef): Promise<readonly ({ from: number; to: number } | null)[]>;
  /** Addresses of the centre's managers. */
  managers(centre: CentreRef): Promise<string[]>;
}
