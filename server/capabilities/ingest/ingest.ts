import { INGEST_LIMITS } from '#shared/contracts/ingest.ts';
import { CLOCK_ERROR_MS, type Centre, type GatewayNews, heardNumber, type KeyHolder } from '#server/capabilities/centre/index.ts';
import { Refusal } from '#server/platform/http/refusal.ts';
import type { EntryResult, Ledger, LedgerOptions } from '#server/platform/journal/ledger.ts';
import { judge } from './judge.ts';

export interface IngestAnswer {
  accepted: number;
  duplicates: number;
  setAside: { index: number; id: string; reason: string }[];
}

/** What a request of a gateway holds. */
export interface Report {
  from: Pick<KeyHolder, 'gateway' | 'centre'>;
  elements: readonly unknown[];
  /** Server time of arrival, epoch ms. */
  receivedAt: number;
  /** The gateway's own clock as it sent, epoch ms; null: it didn't say. */
  gatewayTime: number | null;
}

type Entry = ReturnType<typeof judge>;

/** Takes in what a gateway heard; answers after the commit. */
export type Ingest = (report: Report, options?: LedgerOptions) => Promise<IngestAnswer>;

export function createIngestOf(ledger: Ledger, centre: Pick<Centre, 'gateways'>): Ingest {
  return async ({ from, elements, receivedAt, gatewayTime }, options) => {
    if (elements.length > INGEST_LIMITS.events) throw new Refusal(413, 'events.too-large', { what: 'events', max: INGEST_LIMITS.events });
    const measured = gatewayTime === null ? null : gatewayTime - receivedAt;
    const clockError = measured !== null && Math.abs(measured) > CLOCK_ERROR_MS ? measured : 0;
    const at = { gateway: from.gateway, lanes: from.centre.lanes, receivedAt, clockError };
    const entries = elements.map((element) => judge(element, at));
    const results = await ledger.submit(from.centre, entries, receivedAt, options);
    await centre.gateways.note(from.centre, from.gateway, (news) => newsOf(news, { entries, results, receivedAt, measured }));
    return answerOf(entries, results);
  };
}

function answerOf(entries: readonly Entry[], results: readonly EntryResult[]): IngestAnswer {
  const answer: IngestAnswer = { accepted: 0, duplicates: 0, setAside: [] };
  results.forEach((result, index) => {
    if (result.outcome === 'accepted') answer.accepted += 1;
    else if (result.outcome === 'duplicate') answer.duplicates += 1;
    else answer.setAside.push({ index, id: entries[index]?.id ?? '', reason: result.reason });
  });
  return answer;
}

interface Told {
  entries: readonly Entry[];
  results: readonly EntryResult[];
  receivedAt: number;
  measured: number | null;
}

/** What a request tells of its gateway besides the events. */
function newsOf(news: GatewayNews, { entries, results, receivedAt, measured }: Told): GatewayNews {
  const next: GatewayNews = { ...news, heardAt: Math.max(news.heardAt ?? 0, receivedAt), clockErrorMs: measured ?? news.clockErrorMs };
  const changed = results.filter((result) => result.outcome === 'duplicate' && result.changed).length;
  if (changed > 0) Object.assign(next, { changedRepeats: news.changedRepeats + changed, changedRepeatAt: receivedAt });
  for (const { type, data, time, source, sequence } of entries) {
    if (sequence !== null && source !== '') next.sequences = { ...next.sequences, [source]: heardNumber(next.sequences[source], sequence) };
    if (data === null || (type !== 'gateway.started' && type !== 'gateway.heartbeat')) continue;
    const said = data as { queued?: number; uptimeS?: number };
    Object.assign(next, { queued: said.queued ?? null, uptimeS: said.uptimeS ?? null });
    if (type === 'gateway.started') next.startedAt = Math.max(next.startedAt ?? 0, time);
  }
  return next;
}
