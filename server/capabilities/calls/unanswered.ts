import { unansweredSince } from '#shared/domain/calls/escalation.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import { unansweredMail } from '#shared/text/en/calls.ts';
import { timeOfDay } from '#shared/text/en/formats.ts';
import type { Mail, Notices } from '#server/capabilities/notices/index.ts';
import type { Deps } from '#server/deps.ts';
import { unitOfWork } from '#server/platform/db/unit-of-work.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

const MINUTE = 60_000;

export interface UnansweredSources {
  centres(): Promise<CentreRef[]>;
  /** Addresses of those who keep the record: the centre's managers. */
  recipients(centre: CentreRef): Promise<readonly string[]>;
  queueMail: Notices['queueMail'];
}

/** Writes the one letter about each call that nobody answered in time; asked again it writes none. Returns how many were written. */
export function unansweredMails({ db, ledger, config }: Pick<Deps, 'db' | 'ledger' | 'config'>, sources: UnansweredSources) {
  const written = new Set<string>();
  const inCentre = async (centre: CentreRef, now: number): Promise<number> => {
    const { state } = await ledger.read(centre);
    const due = Object.values(state.calls.open).filter((call) => !written.has(call.id) && now - (unansweredSince(call, now) ?? now) >= centre.rules.otherMechanicMin * MINUTE);
    if (due.length === 0) return 0;
    const to = await sources.recipients(centre);
    const letters = due.flatMap((call) => to.map((recipient) => ({ ...letterOf(call, centre, config.publicUrl), to: recipient })));
    const fresh = await unitOfWork(db, async (trx) => {
      let count = 0;
      for (const letter of letters) if (await sources.queueMail(trx, letter)) count += 1;
      return count;
    });
    for (const call of due) written.add(call.id);
    return fresh;
  };
  return async (now: number): Promise<number> => {
    let count = 0;
    for (const centre of await sources.centres()) count += await inCentre(centre, now);
    return count;
  };
}

function letterOf(call: Call, centre: CentreRef, publicUrl: string | null): Omit<Mail, 'to'> {
  const address = publicUrl === null ? null : `${publicUrl}/${centre.slug}/calls/${call.id}`;
  const text = unansweredMail.text(call, timeOfDay(call.raisedAt, centre.zone), centre.rules.otherMechanicMin, address);
  const html = text.split('\n\n').map((part) => `<p>${escaped(part)}</p>`).join('\n');
  return { centreId: centre.id, key: `call-unanswered/${call.id}`, subject: unansweredMail.subject(call, centre.name), text, html };
}

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (text: string): string => text.replace(/[&<>"]/g, (sign) => ENTITIES[sign] ?? sign);
