import type * as z from 'zod/mini';
import { eventAttributes, type setAsideEvent } from '#shared/contracts/ingest.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import { setAsideSentence } from '#shared/text/en/ingest.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger, MendedEvent } from '#server/platform/journal/ledger.ts';
import type { SetAsideRow } from '#server/platform/journal/set-aside-store.ts';
import { judgeEvent } from './judge.ts';
import type { SetAsideReads } from './read-model.ts';

type Listed = z.infer<typeof setAsideEvent>;
interface Still {
  source: string;
  id: string;
  reason: string;
  says: string;
}

const LISTED = 500;

export function setAsideCommands(ledger: Ledger, reads: SetAsideReads) {
  return {
    async list(centre: CentreRef): Promise<Listed[]> {
      return (await reads.list(centre.id, LISTED)).map((row) => ({
        source: row.source, id: row.id, type: row.type, time: row.time_at.getTime(), receivedAt: row.received_at.getTime(), reason: row.reason ?? '',
        says: setAsideSentence(row.reason ?? ''), gateway: row.by_name, sent: JSON.parse(row.sent ?? 'null') as unknown,
      }));
    },
    /** Judges each again as the centre is now, but for its age; what fits is applied in one unit of work. */
    async apply(centre: CentreRef, names: readonly { source: string; id: string }[], by: Person, now: number): Promise<{ applied: number; still: Still[] }> {
      const mended: MendedEvent[] = [];
      const still: Still[] = [];
      for (const { source, id } of names) {
        const row = await reads.find(centre.id, source, id);
        const judged = row ? again(row, centre, now) : { reason: 'event.not-set-aside' };
        if ('data' in judged) mended.push({ source, id, ...judged } as MendedEvent);
        else still.push({ source, id, reason: judged.reason, says: setAsideSentence(judged.reason) });
      }
      return { applied: mended.length > 0 ? await ledger.mend(centre, mended, by) : 0, still };
    },
  };
}

/** A person vouches for its age; a missing id is no hindrance any more, as it has got one. */
function again(row: SetAsideRow, centre: CentreRef, now: number) {
  const sent = JSON.parse(row.sent ?? 'null') as unknown;
  const named = typeof sent === 'object' && sent !== null ? { ...sent, source: row.source || 'unknown', id: row.id } : sent;
  const attributes = eventAttributes.safeParse(named);
  if (!attributes.success) return { reason: row.reason ?? 'event.invalid' };
  return judgeEvent(attributes.data, { lanes: centre.lanes, receivedAt: now, clockError: attributes.data.time - row.time_at.getTime() }, Infinity);
}
