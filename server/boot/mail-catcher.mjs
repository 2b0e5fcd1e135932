// The demo's mail catcher as a child: where it listens is kept, so that its page stays at one address.
import fs from 'node:fs';
import path from 'node:path';
import { keepRunning } from './child.mjs';
import { freePort, isPortFree } from './processes.mjs';
import { StopError } from './steps.mjs';

/** Starts the catcher; `listening` resolves once it does, while the server, told `smtpUrl`, may start already. */
export async function startMailCatcher({ dataDir, env, output }) {
  const { smtp, page } = await portsFor(path.join(dataDir, 'mail-ports.json'));
  let child;
  const listening = new Promise((resolve, reject) => {
    child = keepRunning({
      name: 'The mail catcher',
      file: 'server/fakes/mail/main.ts',
      args: [`--smtp-port=${smtp}`, `--page-port=${page}`],
      env,
      output,
      onMessage: (message) => {
        if (message?.type !== 'ready') return;
        child.settle();
        resolve();
      },
      onFirstExit: (how) => reject(new StopError(`The mail catcher didn't start (${how}).`)),
    });
  });
  listening.catch(() => {}); // told to whoever waits for it
  return { child, listening, smtpUrl: `smtp://127.0.0.1:${smtp}`, pageUrl: `http://localhost:${page}` };
}

async function portsFor(file) {
  const kept = fs.existsSync(file) ? JSON.parse(fs.readFileSync(file, 'utf8')) : {};
  const ports = { smtp: await freeOr(kept.smtp), page: await freeOr(kept.page) };
  fs.writeFileSync(file, JSON.stringify(ports));
  return ports;
}

const freeOr = async (kept) => (kept && (await isPortFree(kept)) ? kept : freePort());
