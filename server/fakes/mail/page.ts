import { createServer, type Server, type ServerResponse } from 'node:http';
import type { Box, CaughtMail } from './box.ts';

/**
 * The page of caught mails: `/` the list, `/mails` the same as JSON (newest
 * first), `/mails/<number>` one mail as plain text. Nothing of a mail is ever
 * sent as HTML: what it holds came from outside.
 */
export function createPage(box: Box): Server {
  return createServer((request, response) => {
    const path = (request.url ?? '/').split('?')[0] ?? '/';
    const number = /^\/mails\/(\d+)$/.exec(path)?.[1];
    const mail = number === undefined ? undefined : box.find(Number(number));
    if (path === '/') send(response, 200, 'text/html', list(box.all()));
    else if (path === '/mails') send(response, 200, 'application/json', JSON.stringify(box.all()));
    else if (mail !== undefined) send(response, 200, 'text/plain', letter(mail));
    else send(response, 404, 'text/plain', 'No such mail');
  });
}

function send(response: ServerResponse, status: number, type: string, body: string): void {
  response.writeHead(status, {
    'content-type': `${type}; charset=utf-8`,
    'cache-control': 'no-store',
    'x-content-type-options': 'nosniff',
    'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'",
  });
  response.end(body);
}

const STYLE = `body{font:15px/1.5 system-ui,sans-serif;margin:2rem auto;max-width:64rem;padding:0 1rem}
table{border-collapse:collapse;width:100%}th,td{text-align:left;padding:.3rem .8rem .3rem 0;border-bottom:1px solid #ccc;vertical-align:top}`;

function list(mails: readonly CaughtMail[]): string {
  const rows = mails.map(
    (mail) =>
      `<tr><td>${new Date(mail.at).toISOString().slice(0, 19).replace('T', ' ')}</td><td>${escape(mail.to.join(', '))}</td><td><a href="/mails/${mail.number}">${escape(mail.subject || '(no subject)')}</a></td></tr>`,
  );
  const body = rows.length === 0 ? '<p>None yet.</p>' : `<table><tr><th>Caught (UTC)</th><th>To</th><th>Subject</th></tr>${rows.join('')}</table>`;
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Caught mail</title><style>${STYLE}</style></head><body><h1>Caught mail</h1>${body}</body></html>`;
}

const letter = (mail: CaughtMail): string =>
  [`From: ${mail.from}`, `To: ${mail.to.join(', ')}`, `Subject: ${mail.subject}`, `Message-ID: ${mail.messageId ?? ''}`, '', mail.text].join('\n');

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escape = (text: string): string => text.replace(/[&<>"']/g, (character) => ENTITIES[character] ?? character);
