// `npm start` and `npm run dev`: sets up what is missing, then owns database, server and fakes until it is told to stop.
// Plain Node: runs before anything is installed.
import path from 'node:path';
import { keepRunning } from './child.mjs';
import { ensureClient } from './client.mjs';
import { useDatabase } from './database-use.mjs';
import { tryLock, unlock } from './lock.mjs';
import { endOfLog, openLog } from './log-file.mjs';
import { startMailCatcher } from './mail-catcher.mjs';
import { checkNode, ensureModules, ensurePrograms } from './packages.mjs';
import { checkReach, makeDataDir, readSettings } from './settings.mjs';
import { runEntry, say, StopError } from './steps.mjs';
import { askToStop, isStopAsked, keep, stopAsked, unwind } from './unwind.mjs';
import { watchSources } from './watch.mjs';

const STILL_WAITING_MS = 10_000;
/** It keeps on disk what isn't acknowledged, so that nothing is lost when it is cut off in a long send. */
const GATEWAY_PATIENCE_MS = 2_000;

const dev = process.argv.includes('--dev');
async function start() {
  const settings = readSettings(process.env);
  checkNode();
  makeDataDir(settings);
  await claim(settings);
  await checkReach(settings);
  await ensurePrograms({ database: settings.databaseUrl === null });
  await ensureModules();
  if (!dev) await ensureClient();
  const databaseUrl = await ensureDatabase(settings);
  const log = dev ? { fd: 'inherit' } : openLog(settings.dataDir);
  const env = {
    ...process.env,
    PORT: String(settings.port),
    DATA_DIR: settings.dataDir,
    DATABASE_URL: databaseUrl,
    LANEWRIGHT_DEMO: settings.demo ? 'on' : 'off',
    LANEWRIGHT_DEV: dev ? '1' : '0',
  };
  const mail = settings.demo && settings.smtpUrl === null ? await catchMail(settings, env, log) : null;
  await startServer(mail ? { ...env, SMTP_URL: mail.smtpUrl } : env, log);
  if (mail) {
    await Promise.race([mail.listening, stopAsked]);
    say(`Mail that it sends is caught at ${mail.pageUrl}`);
  }
  if (settings.demo) await startGateway(env, log);
  const address = settings.publicUrl ?? `http://localhost:${settings.port}`;
  say(`Lanewright is at ${address} (ready in ${process.uptime().toFixed(1)} s)`);
}

/** One start a data folder. */
async function claim(settings) {
  const file = path.join(settings.dataDir, 'start.lock');
  const holder = tryLock(file);
  if (holder !== 0) throw new StopError(`DATA_DIR=${settings.dataDir}: Lanewright already runs from it (process ${holder}).`);
  await keep(() => unlock(file));
}

async function ensureDatabase(settings) {
  if (settings.databaseUrl !== null) return settings.databaseUrl;
  const database = await useDatabase(settings.dataDir, { port: settings.dbPort, say });
  await keep(database.release);
  return database.url;
}

async function catchMail(settings, env, log) {
  const mail = await startMailCatcher({ dataDir: settings.dataDir, env, output: log.fd });
  await keep(mail.child.stop);
  return mail;
}

async function startServer(env, log) {
  const waiting = setInterval(() => say(`Waiting for the server (${Math.round(process.uptime())} s so far)`), STILL_WAITING_MS);
  const tell = (text) => {
    waiting.refresh(); // whoever reads knows that it works
    say(text);
  };
  let server;
  const ready = new Promise((resolve, reject) => {
    server = keepRunning({
      name: 'The server',
      file: 'server/main.ts',
      env,
      output: log.fd,
      onMessage: (message) => {
        if (message?.type === 'say') tell(String(message.text));
        if (message?.type === 'ready') resolve();
      },
      onFirstExit: (how) => reject(new StopError(`The server didn't start (${how}).${log.file ? ` The end of ${log.file}:\n${endOfLog(log.file)}` : ''}`)),
    });
  });
  ready.catch(() => {}); // told below, after the child is on the list
  await keep(server.stop);
  if (dev) {
    const unwatch = watchSources((file) => {
      say(`${file} changed; starting the server again`);
      void server.restart();
    });
    await keep(unwatch);
  }
  try {
    await Promise.race([ready, stopAsked]);
  } finally {
    clearInterval(waiting);
  }
  server.settle();
}

async function startGateway(env, log) {
  const gateway = keepRunning({ name: 'The demo gateway', file: 'server/fakes/gateway/main.ts', args: ['--demo'], env, output: log.fd, patienceMs: GATEWAY_PATIENCE_MS });
  gateway.settle();
  await keep(gateway.stop);
}

for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP']) process.on(signal, askToStop);
process.on('disconnect', askToStop); // started by a program that has died

await runEntry(async () => {
  try {
    await start();
    await stopAsked;
  } catch (error) {
    await unwind();
    if (!isStopAsked()) throw error;
  }
  return 0;
});
process.exit();
