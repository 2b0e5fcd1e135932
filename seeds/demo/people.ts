import { chmodSync, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { type Accounts, randomPassword } from '#server/capabilities/accounts/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

export interface DemoPerson {
  id: string;
  name: string;
  role: 'manager' | 'desk' | 'mechanic' | 'secretary';
}

/** Invented people; a secretary names the slot of the leagues that are hers. */
const PEOPLE = [
  { role: 'manager', name: 'Ines Quill', email: 'manager@tarn-ferry.example' },
  { role: 'desk', name: 'Bo Larch', email: 'desk@tarn-ferry.example' },
  { role: 'mechanic', name: 'Odell Fenn', email: 'mechanic@tarn-ferry.example' },
  { role: 'mechanic', name: 'Maru Stake', email: 'mechanic2@tarn-ferry.example' },
  { role: 'secretary', name: 'Wanda Moth', email: 'secretary@tarn-ferry.example', slot: 'owls' },
  { role: 'secretary', name: 'Piet Weir', email: 'secretary2@tarn-ferry.example', slot: 'early' },
] as const;

export const ACCOUNTS_FILE = 'demo-accounts.txt';

/**
 * Makes the demo's accounts with random passwords, and the wall's link. Each line is `role⇥email⇥password`, for the display
 * `display⇥-⇥URL`; they are kept in the data folder, readable by its owner alone, and returned to be printed once.
 */
export async function demoPeople(
  accounts: Accounts, centre: CentreRef, leagues: ReadonlyMap<string, string[]>, place: { dataDir: string; publicUrl: string },
): Promise<{ people: DemoPerson[]; lines: string[] }> {
  const people: DemoPerson[] = [];
  const lines: string[] = [];
  for (const person of PEOPLE) {
    const password = randomPassword();
    const id = await accounts.createAccount({ name: person.name, email: person.email, password });
    await accounts.addMembership({ user: id, centre, role: person.role, leagues: 'slot' in person ? (leagues.get(person.slot) ?? []) : [] });
    people.push({ id, name: person.name, role: person.role });
    lines.push(`${person.role}\t${person.email}\t${password}`);
  }
  const { path } = await accounts.createDisplayLink({ centre, name: 'Wall above lane 16', by: people[0]?.id ?? '' });
  lines.push(`display\t-\t${place.publicUrl}${path}`);
  mkdirSync(place.dataDir, { recursive: true });
  const file = join(place.dataDir, ACCOUNTS_FILE);
  writeFileSync(file, `${lines.join('\n')}\n`, { mode: 0o600 });
  chmodSync(file, 0o600);
  return { people, lines };
}
