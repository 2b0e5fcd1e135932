import { simpleParser } from 'mailparser';
import { SMTPServer, type SMTPServerSession } from 'smtp-server';
import type { Readable } from 'node:stream';
import type { Box } from './box.ts';

/** Bytes of one mail at most; a larger one is refused as a real server would. */
const LARGEST_MAIL = 10 * 1024 * 1024;

/** A server that takes every mail, for anybody, without sign-in or TLS, into `box`. It listens on loopback only. */
export function createSmtp(box: Box): SMTPServer {
  return new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    logger: false,
    size: LARGEST_MAIL,
    onData(stream, session, done) {
      receive(stream, session, box).then(() => done(), done);
    },
  });
}

async function receive(stream: Readable, session: SMTPServerSession, box: Box): Promise<void> {
  const mail = await simpleParser(stream);
  box.add({
    at: Date.now(),
    messageId: mail.messageId ?? null,
    from: mail.from?.text ?? (session.envelope.mailFrom ? session.envelope.mailFrom.address : ''),
    to: session.envelope.rcptTo.map(({ address }) => address),
    subject: mail.subject ?? '',
    text: mail.text ?? '',
    html: mail.html || null,
  });
}
