import { once } from 'node:events';
import type { AddressInfo, Server } from 'node:net';
import { createTransport } from 'nodemailer';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createBox, type CaughtMail } from './box.ts';
import { createPage } from './page.ts';
import { createSmtp } from './smtp.ts';

const box = createBox();
const smtp = createSmtp(box);
const page = createPage(box);
let smtpPort: number;
let address: string;

const portOf = (server: Server): number => (server.address() as AddressInfo).port;

beforeAll(async () => {
  smtp.listen(0, '127.0.0.1');
  page.listen(0, '127.0.0.1');
  await Promise.all([once(smtp.server, 'listening'), once(page, 'listening')]);
  smtpPort = portOf(smtp.server);
  address = `http://127.0.0.1:${portOf(page)}`;
});
afterAll(async () => {
  page.close();
  await new Promise<void>((resolve) => smtp.close(resolve));
});

async function send(subject: string): Promise<void> {
  const transport = createTransport(`smtp://127.0.0.1:${smtpPort}`);
  await transport.sendMail({
    from: 'Lanewright <desk@centre.test>',
    to: ['manager@centre.test', 'mechanic@centre.test'],
    subject,
    text: 'Lane 12 – naïve',
    html: '<p>Lane 12</p>',
    messageId: '<session.7.manager@lanewright>',
  });
  transport.close();
}

test('a mail sent by SMTP is on the list, newest first, with envelope and Message-ID', async () => {
  await send('First');
  await send('Second <b>');
  const mails = (await (await fetch(`${address}/mails`)).json()) as CaughtMail[];
  expect(mails.map(({ number, subject }) => [number, subject])).toEqual([[2, 'Second <b>'], [1, 'First']]);
  expect(mails[0]).toMatchObject({
    messageId: '<session.7.manager@lanewright>',
    from: '"Lanewright" <desk@centre.test>',
    to: ['manager@centre.test', 'mechanic@centre.test'],
    html: '<p>Lane 12</p>',
  });
  expect(mails[0]?.text.trim()).toBe('Lane 12 – naïve');
});

test('the page shows subjects as text, and a mail as plain text', async () => {
  const list = await (await fetch(address)).text();
  expect(list).toContain('Second &lt;b&gt;');
  expect(list).not.toContain('Second <b>');
  const letter = await fetch(`${address}/mails/1`);
  expect(letter.headers.get('content-type')).toBe('text/plain; charset=utf-8');
  expect(await letter.text()).toContain('Subject: First');
  expect((await fetch(`${address}/mails/99`)).status).toBe(404);
});
