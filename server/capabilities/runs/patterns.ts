import type { RevisionBody } from '#shared/contracts/runs.ts';
import { validatePattern } from '#shared/domain/runs/rules.ts';
import { conflict, notFound, Refusal } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { insertMachine, insertPattern, insertRevision, type Machine, patternsOf, revisionsOf } from './store.ts';

/** Refuses a revision that contradicts itself: every contradiction with its code, beside the field of the pass it is in. */
function demandValid(revision: RevisionBody): void {
  const problems = validatePattern(revision);
  if (problems.length === 0) return;
  const pointer = ({ pass, zone, field }: (typeof problems)[number]['place']): string =>
    `/revision${pass ? `/passes/${pass - 1}` : zone ? `/cleanerZones/${zone - 1}` : ''}/${field}`;
  throw new Refusal(422, 'pattern.invalid', { count: problems.length }, problems.map((p) => ({ pointer: pointer(p.place), code: p.code, params: { ...p.params, ...(p.place.pass ? { pass: p.place.pass } : {}) } })));
}

const codeTaken = (code: string, params: Record<string, string>): Refusal => new Refusal(409, code, params, [{ pointer: '/code', code, params }]);

interface Written {
  name?: string;
  code: string;
  revision: RevisionBody;
  note: string | null;
  by: string;
}

/** A new pattern with its first revision. */
export function addPattern(ledger: Ledger, centre: CentreRef, given: Written & { name: string }): Promise<void> {
  demandValid(given.revision);
  return ledger.decide(centre, async (_house, now, trx) => {
    if ((await patternsOf(trx, centre.id)).some((p) => p.code === given.code)) throw codeTaken('pattern.code-taken', { pattern: given.code });
    return {
      facts: [], topics: ['patterns'], result: () => undefined,
      write: async (tx) => {
        await insertPattern(tx, centre.id, { code: given.code, name: given.name }, now);
        await insertRevision(tx, centre.id, { code: given.code, revision: 1, body: given.revision, note: given.note, by: given.by, at: now });
      },
    };
  });
}

/** A new revision; those before never change. `start` numbers the first of a pattern that is brought along. */
export function revisePattern(ledger: Ledger, centre: CentreRef, given: Written): Promise<void> {
  demandValid(given.revision);
  return ledger.decide(centre, async (_house, now, trx) => {
    const before = await revisionsOf(trx, centre.id, given.code);
    const newest = before.at(-1);
    if (!newest) throw notFound('pattern.unknown', { pattern: given.code });
    if (JSON.stringify(canonical(newest.body)) === JSON.stringify(canonical(given.revision))) throw conflict('pattern.unchanged', { revision: newest.revision });
    return {
      facts: [], topics: ['patterns'], result: () => undefined,
      write: async (tx) => {
        await insertRevision(tx, centre.id, { code: given.code, revision: newest.revision + 1, body: given.revision, note: given.note, by: given.by, at: now });
      },
    };
  });
}

/** The same revision in one order of keys. */
function canonical(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(canonical);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, inner]) => [key, canonical(inner)]));
}

export function addMachine(ledger: Ledger, centre: CentreRef, machine: Machine): Promise<void> {
  return ledger.decide(centre, (_house, now) => ({
    facts: [], topics: ['settings'], result: () => undefined,
    write: async (tx) => {
      if (!(await insertMachine(tx, centre.id, machine, now))) throw codeTaken('machine.code-taken', { machine: machine.code });
    },
  }));
}
