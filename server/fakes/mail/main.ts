import { once } from 'node:events';
import { parseArgs } from 'node:util';
import { createBox } from './box.ts';
import { createPage } from './page.ts';
import { createSmtp } from './smtp.ts';

/**
 * The mail catcher, a process of its own: `--smtp-port` takes mail, `--page-port`
 * shows it, both on loopback. Sends `{type: 'ready'}` once it listens, and ends
 * when the channel of whoever started it closes.
 */
const LOOPBACK = '127.0.0.1';

const { values } = parseArgs({ options: { 'smtp-port': { type: 'string' }, 'page-port': { type: 'string' } } });
const box = createBox();
const smtp = createSmtp(box);
const page = createPage(box);
smtp.on('error', (error: Error) => console.error(error.message));
const smtpListens = once(smtp.listen(portOf('smtp-port'), LOOPBACK), 'listening');
const pageListens = once(page.listen(portOf('page-port'), LOOPBACK), 'listening');
await Promise.all([smtpListens, pageListens]);

for (const event of ['disconnect', 'SIGTERM', 'SIGINT'] as const) process.on(event, () => process.exit(0));
process.send?.({ type: 'ready' });

function portOf(name: 'smtp-port' | 'page-port'): number {
  const port = Number(values[name]);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) throw new Error(`--${name}: a port number is needed`);
  return port;
}
