import type { PairFormat } from './frames.ts';
import type { SessionKind } from './session-kinds.ts';

/** One evening on its lanes, as booked; from the season of a league or by itself. Instants in ms, `date` is the business date. */
export interface Session {
  id: string;
  kind: SessionKind;
  leagueId: string | null;
  name: string;
  date: string;
  lanes: readonly number[];
  warmUpAt: number;
  startAt: number;
  endAt: number;
  status: 'booked' | 'cancelled';
  /** Code of the pattern that it wants; null: any. */
  pattern: string | null;
  /** Revision wanted; null: any of that pattern. */
  revision: number | null;
  /** Asks for lanes on which nobody else has bowled since dressing. */
  fresh: boolean;
  sanctioned: boolean;
  teams: number | null;
  format: PairFormat | null;
}
