import type { Knex } from 'knex';
import { isDuplicate } from '#server/platform/db/errors.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';
import { newId, toBinary } from '#server/platform/db/uuid.ts';

export interface Waiting {
  centreId: Buffer;
  id: Buffer;
  messageId: string;
  recipient: string;
  subject: string;
  text: string;
  html: string;
  attempts: number;
}

interface MailRow {
  centre_id: Buffer;
  id: Buffer;
  message_id: string;
  recipient: string;
  subject: string;
  text_body: string;
  html_body: string;
  attempts: number;
  next_try_at: Date;
}

/** Puts a letter in the outbox; false when the same key was written for this recipient before. */
export async function insertMail(
  trx: Knex, centreId: Buffer, key: string, messageId: string, mail: { to: string; subject: string; text: string; html: string }, now: number,
): Promise<boolean> {
  try {
    await trx('mail_outbox').insert({
      centre_id: centreId, id: toBinary(newId(now)), mail_key: key, recipient: mail.to, message_id: messageId, subject: mail.subject,
      text_body: mail.text, html_body: mail.html, created_at: toRowTime(now), next_try_at: toRowTime(now),
    });
    return true;
  } catch (error) {
    if (isDuplicate(error, 'mail_outbox_once')) return false;
    throw error;
  }
}

/** Letters that are due, oldest first. */
export async function dueMails(db: Knex, now: number, limit: number): Promise<Waiting[]> {
  const rows = (await db('mail_outbox').whereNull('sent_at').where('next_try_at', '<=', toRowTime(now)).orderBy('created_at').limit(limit)) as MailRow[];
  return rows.map((row) => ({
    centreId: row.centre_id, id: row.id, messageId: row.message_id, recipient: row.recipient, subject: row.subject, text: row.text_body,
    html: row.html_body, attempts: row.attempts,
  }));
}

export async function markSent(db: Knex, mail: Waiting, now: number): Promise<void> {
  await db('mail_outbox').where({ centre_id: mail.centreId, id: mail.id }).update({ sent_at: toRowTime(now), last_error: null, attempts: mail.attempts + 1 });
}

export async function markFailed(db: Knex, mail: Waiting, error: string, nextTry: number): Promise<void> {
  await db('mail_outbox')
    .where({ centre_id: mail.centreId, id: mail.id })
    .update({ last_error: error.slice(0, 300), attempts: mail.attempts + 1, next_try_at: toRowTime(nextTry) });
}

/** How many letters wait, and since when the oldest does (epoch ms). */
export async function waitingMails(db: Knex, centreId: Buffer): Promise<{ count: number; since: number | null }> {
  const row = (await db('mail_outbox').where({ centre_id: centreId }).whereNull('sent_at').count({ count: '*' }).min({ since: 'created_at' }).first()) as
    | { count: number; since: Date | null }
    | undefined;
  return { count: Number(row?.count ?? 0), since: row?.since ? fromRowTime(row.since) : null };
}
