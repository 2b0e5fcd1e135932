import type { Person } from '#shared/contracts/accounts.ts';
import { hashPassword, randomPassword } from '#server/platform/auth/passwords.ts';
import type { Clock } from '#server/platform/clock.ts';
import { invalid, notFound } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { accountReadModel } from './read-model.ts';
import type { accountStore, Place } from './store.ts';

/** Ids of the leagues of a centre, so that a secretary is given none of another house. */
export type LeaguesOf = (centre: CentreRef) => Promise<readonly string[]>;

interface Parts {
  store: ReturnType<typeof accountStore>;
  readModel: ReturnType<typeof accountReadModel>;
  clock: Clock;
  leaguesOf: LeaguesOf;
  endSessions: (user: string) => Promise<void>;
}

/** Who belongs to a centre, and as what. */
export function peopleCommands({ store, readModel, clock, leaguesOf, endSessions }: Parts) {
  async function checkPlace(centre: CentreRef, place: Place): Promise<void> {
    if (place.leagues.length === 0) return;
    if (place.role !== 'secretary') throw invalid('person.leagues-of-secretary-only', '/leagues');
    const known = new Set(await leaguesOf(centre));
    const strange = place.leagues.findIndex((league) => !known.has(league));
    if (strange >= 0) throw invalid('league.not-here', `/leagues/${strange}`);
  }

  async function personIn(centre: CentreRef, id: string): Promise<Person> {
    const person = (await readModel.people(centre.id)).find((p) => p.id === id);
    if (person === undefined) throw notFound('person.unknown');
    return person;
  }

  return {
    list: (centre: CentreRef): Promise<Person[]> => readModel.people(centre.id),

    async add(centre: CentreRef, given: { name: string; email: string } & Place): Promise<{ person: Person; password: string | null }> {
      await checkPlace(centre, given);
      const password = randomPassword();
      const account = { name: given.name, email: given.email, passwordHash: await hashPassword(password) };
      const { id, made } = await store.addPerson(centre.id, account, given, clock.now());
      // An account that is signed in elsewhere starts anew, under the limits of all its roles.
      if (!made) await endSessions(id);
      return { person: await personIn(centre, id), password: made ? password : null };
    },

    async change(centre: CentreRef, id: string, place: Place): Promise<Person> {
      await checkPlace(centre, place);
      await store.changePlace(centre.id, id, place);
      await endSessions(id);
      return personIn(centre, id);
    },

    async remove(centre: CentreRef, id: string): Promise<{ ok: true }> {
      await store.removePerson(centre.id, id);
      await endSessions(id);
      return { ok: true };
    },
  };
}

export type PeopleCommands = ReturnType<typeof peopleCommands>;
