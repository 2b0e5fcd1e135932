// The settings as the boot needs them, checked before anything is installed. `server/config.ts` reads them for the program.
import fs from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { isPortFree } from './processes.mjs';
import { runningDatabase } from './database-server.mjs';
import { root, StopError } from './steps.mjs';

const DATABASE_ANSWERS_WITHIN_MS = 3_000;
const LOG_LEVELS = ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'];

const port = (fallback) => (text) => {
  if (text === undefined) return fallback;
  if (!/^\d{1,5}$/.test(text) || Number(text) < 1 || Number(text) > 65_535) throw new Error('must be a port number, 1 to 65535');
  return Number(text);
};
const oneOf = (words, fallback) => (text) => {
  if (text === undefined) return fallback;
  if (!words.includes(text)) throw new Error(`must be one of ${words.join(', ')}`);
  return text;
};
const url = (...schemes) => (text) => {
  if (text === undefined) return null;
  if (!URL.canParse(text) || !schemes.includes(new URL(text).protocol.slice(0, -1)) || new URL(text).hostname === '') {
    throw new Error(`must be a URL that begins with ${schemes.map((scheme) => `${scheme}://`).join(' or ')}`);
  }
  return text;
};

const VARIABLES = {
  PORT: port(4310),
  DB_PORT: port(3316),
  DATA_DIR: (text) => path.resolve(root, text ?? '.data'),
  DATABASE_URL: url('mysql', 'mariadb'),
  SMTP_URL: url('smtp', 'smtps'),
  PUBLIC_URL: url('http', 'https'),
  LANEWRIGHT_DEMO: oneOf(['on', 'off'], 'on'),
  NODE_ENV: oneOf(['production', 'development', 'test'], 'development'),
  LOG_LEVEL: oneOf(LOG_LEVELS, 'info'),
};

/** Reads all; an empty variable counts as not given. Throws a `StopError` that names each bad one. */
export function readSettings(env) {
  const problems = [];
  const read = {};
  for (const [name, parse] of Object.entries(VARIABLES)) {
    try {
      read[name] = parse(env[name] === '' ? undefined : env[name]);
    } catch (error) {
      // the value of a URL is not repeated: it may hold a password
      problems.push(`${name}${name.endsWith('_URL') ? '' : `=${env[name]}: it`} ${error.message}.`);
    }
  }
  if (read.DATABASE_URL === null && read.PORT !== undefined && read.PORT === read.DB_PORT) problems.push(`PORT and DB_PORT are both ${read.PORT}.`);
  if (problems.length > 0) throw new StopError(problems.join('\n'));
  const production = read.NODE_ENV === 'production';
  return {
    port: read.PORT,
    dbPort: read.DB_PORT,
    dataDir: read.DATA_DIR,
    databaseUrl: read.DATABASE_URL,
    smtpUrl: read.SMTP_URL,
    publicUrl: read.PUBLIC_URL,
    production,
    demo: read.LANEWRIGHT_DEMO === 'on' && !production,
  };
}

/** Makes the data folder, or stops with its name. */
export function makeDataDir(settings) {
  try {
    makeFolder(settings.dataDir);
    fs.accessSync(settings.dataDir, fs.constants.W_OK);
  } catch (error) {
    throw new StopError(`DATA_DIR=${settings.dataDir}: it can't be written to (${error.code}).`);
  }
}

/** Node's own recursive mkdir never returns below a folder like /proc, which answers ENOENT. */
function makeFolder(folder) {
  if (fs.existsSync(folder)) return;
  makeFolder(path.dirname(folder));
  fs.mkdirSync(folder);
}

/** Stops with the name of a port that somebody else has, or of a database elsewhere that doesn't answer. */
export async function checkReach(settings) {
  if (!(await isPortFree(settings.port, ['0.0.0.0', '::']))) throw new StopError(`PORT=${settings.port}: it is taken by another program.`);
  if (settings.databaseUrl === null) await checkDatabasePort(settings);
  else await checkAnswers(settings.databaseUrl);
}

export async function checkDatabasePort(settings) {
  if (runningDatabase(settings.dataDir)?.port === settings.dbPort) return;
  if (!(await isPortFree(settings.dbPort))) throw new StopError(`DB_PORT=${settings.dbPort}: it is taken by another program.`);
}

function checkAnswers(databaseUrl) {
  const { hostname, port } = new URL(databaseUrl);
  const place = `${hostname}:${port || 3306}`;
  return new Promise((resolve, reject) => {
    const socket = net.connect({ host: hostname, port: Number(port || 3306), timeout: DATABASE_ANSWERS_WITHIN_MS });
    const fail = () => {
      socket.destroy();
      reject(new StopError(`DATABASE_URL: nothing answers at ${place}.`));
    };
    socket.once('timeout', fail);
    socket.once('error', fail);
    socket.once('connect', () => {
      socket.destroy();
      resolve();
    });
  });
}
