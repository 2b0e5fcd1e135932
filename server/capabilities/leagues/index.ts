import type { BookingForm, LeagueForm } from '#shared/contracts/leagues.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import type { Deps } from '#server/deps.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import type { Ledger, LedgerOptions } from '#server/platform/journal/ledger.ts';
import { leagueCommands } from './commands.ts';
import type { PatternName } from './nights.ts';
import { leaguesReadModel } from './read-model.ts';
import { leagueRoutes } from './routes.ts';
import { type MoveGuard, sessionCommands } from './session-commands.ts';

export type { MoveGuard } from './session-commands.ts';
export { type PatternName, patternNames } from './nights.ts';
export { leaguesSeenBy } from './routes.ts';

export interface Leagues {
  routes: Route[];
  /** Ids of all leagues of a centre. */
  leagueIds(centre: CentreRef): Promise<string[]>;
  /** Names of the leagues that want a pattern, by its code. */
  patternUsers(centre: CentreRef): Promise<Map<string, string[]>>;
  /** One session, whatever its status; null when the centre has none of that id. */
  session(centre: CentreRef, id: string): Promise<Session | null>;
  /** Booked sessions that touch [from, to) ms, by start. */
  sessionsBetween(centre: CentreRef, from: number, to: number): Promise<Session[]>;
  /** Sessions of a business date, cancelled ones too. */
  sessionsOfDate(centre: CentreRef, date: string): Promise<Session[]>;
  /** Makes a league with the sessions of its season that are still to come at `now`; returns its id. */
  createLeague(centre: CentreRef, form: LeagueForm, options?: LedgerOptions): Promise<string>;
  book(centre: CentreRef, form: BookingForm, options?: LedgerOptions): Promise<Session>;
  /** One pair of a session for another, under the centre's lock; `guard` may refuse. */
  movePair(centre: CentreRef, session: string, fromPair: number, toPair: number, guard: MoveGuard): Promise<Session>;
  /** Calls back after leagues or sessions of a centre were changed here; returns how to stop listening. */
  onChanged(listener: (centre: CentreRef) => void): () => void;
}

/** Leagues, their seasons, and everything else that books lanes. `patternsOf`: what a league may ask for. */
export function createLeagues({ db, ledger: plain }: Pick<Deps, 'db' | 'ledger'>, others: { patternsOf: (centre: CentreRef) => Promise<readonly PatternName[]> }): Leagues {
  const listeners = new Set<(centre: CentreRef) => void>();
  const ledger = telling(plain, (centre) => listeners.forEach((listener) => listener(centre)));
  const readModel = leaguesReadModel(db);
  const commands = { ...leagueCommands(ledger, others.patternsOf), ...sessionCommands(ledger) };
  return {
    routes: leagueRoutes(commands, readModel, others.patternsOf),
    leagueIds: readModel.leagueIds,
    patternUsers: readModel.patternUsers,
    session: readModel.session,
    sessionsBetween: readModel.between,
    sessionsOfDate: readModel.ofDate,
    createLeague: commands.create,
    book: commands.book,
    movePair: commands.movePair,
    onChanged(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

/** The same ledger, which says afterwards that something was decided. */
const telling = (ledger: Ledger, changed: (centre: CentreRef) => void): Pick<Ledger, 'decide'> => ({
  async decide(centre, decide, options) {
    const result = await ledger.decide(centre, decide, options);
    changed(centre);
    return result;
  },
});
