import type { Session } from '#shared/domain/leagues/session.ts';
import type { Because } from '#shared/domain/readiness/confirmation.ts';
import type { MailKind } from '#shared/domain/readiness/mails.ts';
import { outstanding, type SessionReadiness } from '#shared/domain/readiness/session.ts';
import { timeOfDay } from '#shared/text/en/formats.ts';
import { heldMail, readyMail, reopenedMail as reopened, type LetterWords } from '#shared/text/en/readiness-mails.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

export interface Letter {
  subject: string;
  text: string;
  html: string;
}

const clockOf = (centre: CentreRef) => (at: number): string => timeOfDay(at, centre.zone);

/** What manager, mechanic and secretary are told about a session that is held, or ready after it was. */
export function newsMail(kind: MailKind, session: Session, readiness: SessionReadiness, centre: CentreRef, publicUrl: string | null): Letter {
  const words = kind === 'ready' ? readyMail(session, clockOf(centre)) : heldMail(kind === 'held-60' ? 60 : 30, session, outstanding(readiness), clockOf(centre));
  return letter(words, session, centre, publicUrl);
}

export const reopenedMail = (session: Session, because: Because, centre: CentreRef, publicUrl: string | null): Letter =>
  letter(reopened(session, because, clockOf(centre)), session, centre, publicUrl);

function letter({ subject, parts }: LetterWords, session: Session, centre: CentreRef, publicUrl: string | null): Letter {
  const address = publicUrl === null ? [] : [`${publicUrl}/${centre.slug}/readiness/${session.id}`];
  const text = [...parts, ...address].join('\n\n');
  const html = [...parts.map((part) => `<p>${escaped(part)}</p>`), ...address.map((url) => `<p><a href="${escaped(url)}">${escaped(url)}</a></p>`)].join('\n');
  return { subject: `${subject} – ${centre.name}`.slice(0, 200), text, html };
}

const escaped = (text: string): string => text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
