import type { AddressInfo } from 'node:net';
import { once } from 'node:events';
import { type CaughtMail, createBox } from '../../server/fakes/mail/box.ts';
import { createSmtp } from '../../server/fakes/mail/smtp.ts';

/** A real SMTP server on loopback that keeps what it takes. */
export async function catchMail(): Promise<{ url: string; mails: () => readonly CaughtMail[]; close(): Promise<void> }> {
  const box = createBox();
  const smtp = createSmtp(box);
  await once(smtp.listen(0, '127.0.0.1'), 'listening');
  const { port } = smtp.server.address() as AddressInfo;
  return { url: `smtp://127.0.0.1:${port}`, mails: box.all, close: () => new Promise((resolve) => { smtp.close(() => resolve()); }) };
}
