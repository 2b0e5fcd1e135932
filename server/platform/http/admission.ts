import { decide, type Actor, type Verdict } from '#shared/policy/policy.ts';
import type { Contract } from '#shared/contracts/contract.ts';
import { Refusal } from './refusal.ts';
import type { CentreRef, Route } from './route.ts';

/** Who asks, and in which house (null: a route of no house). */
export interface Admission {
  actor: Actor;
  centre: CentreRef | null;
}

/**
 * Judges by the policy table before anything of the request is read. Another centre and one that doesn't exist get the same answer, and
 * who isn't signed in learns of neither.
 */
export async function admitToCentre(
  contract: Contract,
  actor: Actor,
  params: Record<string, unknown>,
  centreBySlug: (slug: string) => Promise<CentreRef | null>,
): Promise<Admission> {
  const slug = contract.path.includes('/:centre') ? String(params['centre']) : undefined;
  demand(decide(contract.permission, actor, { centre: slug }), 'centre.unknown');
  if (slug === undefined) return { actor, centre: null };
  const centre = await centreBySlug(slug);
  if (centre === null) throw new Refusal(404, 'centre.unknown');
  return { actor, centre };
}

/** A secretary's own leagues only: another's looks as if it weren't there. */
export async function admitToLeague(route: Route, { actor, centre }: Admission, params: Record<string, unknown>): Promise<void> {
  if (route.league === undefined || centre === null) return;
  const league = await route.league({ centre, params });
  if (league === undefined) return;
  demand(decide(route.contract.permission, actor, { centre: centre.slug, league }), unknownCode(route.contract));
}

/** The code with which the route itself says that it doesn't know the thing. */
const unknownCode = (contract: Contract): string => contract.refusals.find((code) => code.endsWith('.unknown')) ?? 'route.unknown';

function demand(verdict: Verdict, hiddenAs: string): void {
  if (verdict === 'unauthenticated') throw new Refusal(401, 'session.required');
  if (verdict === 'forbidden') throw new Refusal(403, 'forbidden');
  if (verdict === 'hidden') throw new Refusal(404, hiddenAs);
}
