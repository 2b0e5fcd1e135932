import type { Person } from '#shared/domain/journal/fact.ts';
import type { Actor } from '#shared/policy/policy.ts';

/** Who did it, as the journal keeps it. The policy table lets only people and jobs act. */
export function personOf(actor: Actor): Person {
  if (actor.kind === 'user') return { kind: 'user', id: actor.id, name: actor.name };
  if (actor.kind === 'job') return { kind: 'job', id: actor.name, name: actor.name };
  throw new Error(`a ${actor.kind} does not act on a house`);
}
