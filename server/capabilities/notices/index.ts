import { createHash } from 'node:crypto';
import type { Clock } from '#server/platform/clock.ts';
import type { Database } from '#server/platform/db/database.ts';
import type { Logger } from '#server/platform/log.ts';
import type { Postman } from '#server/platform/mail/postman.ts';
import { dueMails, insertMail, markFailed, markSent } from './store.ts';

export interface Mail {
  centreId: Buffer;
  /** Names the occasion: `held-60/<session>`. The same key and recipient is one letter, however often it is asked for. */
  key: string;
  to: string;
  subject: string;
  text: string;
  html: string;
}

export interface Notices {
  /** Writes a letter in the caller's transaction, one row a recipient; false when it had been written. */
  queueMail(trx: Database, mail: Mail): Promise<boolean>;
  /** Sends what is due. A crash between sending and marking sends the letter again under the same Message-ID. */
  sendDue(now: number): Promise<number>;
}

const FROM = 'Lanewright <lanes@lanewright.invalid>';
const BATCH = 50;
const FIRST_RETRY_MS = 15_000;
const LONGEST_RETRY_MS = 15 * 60_000;

/** The same occasion and recipient give the same Message-ID (RFC 5322 §3.6.4), so that mail programs show a repeat once. */
export function messageId({ centreId, key, to }: Pick<Mail, 'centreId' | 'key' | 'to'>): string {
  const name = createHash('sha256').update(centreId).update('\0').update(key).update('\0').update(to.toLowerCase()).digest('hex').slice(0, 40);
  return `<${name}@lanewright.invalid>`;
}

/** `postman` null: no mail server is set; letters wait in the outbox. */
export function createNotices({ db, clock, log }: { db: Database; clock: Clock; log: Logger }, postman: Postman | null): Notices {
  return {
    queueMail: (trx, mail) => insertMail(trx, mail.centreId, mail.key, messageId(mail), mail, clock.now()),
    async sendDue(now) {
      if (!postman) return 0;
      const due = await dueMails(db, now, BATCH);
      let sent = 0;
      for (const mail of due) {
        try {
          await postman.send({ messageId: mail.messageId, from: FROM, to: mail.recipient, subject: mail.subject, text: mail.text, html: mail.html });
        } catch (error) {
          const wait = Math.min(LONGEST_RETRY_MS, FIRST_RETRY_MS * 2 ** mail.attempts);
          log.warn({ err: error, messageId: mail.messageId }, 'mail not taken, will be tried again');
          await markFailed(db, mail, error instanceof Error ? error.message : String(error), now + wait);
          continue;
        }
        await markSent(db, mail, clock.now());
        sent += 1;
      }
      return sent;
    },
  };
}
