import { spawn } from 'node:child_process';
import { chmodSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { endProcess, freePort } from '../../server/boot/processes.mjs';

const ROOT = fileURLToPath(new URL('../../', import.meta.url));
const START = join(ROOT, 'server/boot/start.mjs');

/** `npm start` as a process, with ports and a folder of its own. */
export type StartedProgram = {
  pid: number;
  port: number;
  dbPort: number;
  dataDir: string;
  /** All that it has printed, both streams. */
  output(): string;
  /** Resolves when it has printed this; rejects with the output when it ends first. */
  printed(pattern: RegExp): Promise<void>;
  /** Exit code once it has ended; a signal is its name. */
  ended: Promise<number | NodeJS.Signals | null>;
  /** Living processes that belong to its folder, by command line or environment. */
  processes(): { pid: number; command: string }[];
  /** Ends it and all that is left of it, and removes its folder. */
  clear(): Promise<void>;
};

/** Settings for a start that meets no other: free ports, a folder that an unprivileged account may enter. */
export async function ownSettings(): Promise<{ PORT: string; DB_PORT: string; DATA_DIR: string }> {
  const folder = mkdtempSync(join(tmpdir(), 'lanewright-start-'));
  chmodSync(folder, 0o755);
  return { PORT: String(await freePort()), DB_PORT: String(await freePort()), DATA_DIR: folder };
}

/** Runs `server/boot/start.mjs` with these settings; NODE_ENV and the tests' own settings don't reach it. */
export function startProgram(settings: Record<string, string>): StartedProgram {
  const inherited = Object.entries(process.env).filter(([name]) => !/^(NODE_ENV|VITEST|VITE_|DEV|PROD|SSR|MODE|BASE_URL|TEST|DATABASE_URL|SMTP_URL)/.test(name));
  const child = spawn(process.execPath, [START], { cwd: ROOT, env: { ...Object.fromEntries(inherited), ...settings }, stdio: ['ignore', 'pipe', 'pipe', 'ipc'] });
  let output = '';
  let over = false;
  let changed = () => {};
  const hear = (bytes: Buffer) => {
    output += bytes.toString();
    changed();
  };
  child.stdout?.on('data', hear);
  child.stderr?.on('data', hear);
  const ended = new Promise<number | NodeJS.Signals | null>((resolve) => {
    child.once('close', (code, signal) => {
      over = true;
      changed();
      resolve(code ?? signal);
    });
  });
  const dataDir = settings['DATA_DIR'] ?? '';
  const processes = () => processesOf(dataDir).filter(({ pid }) => pid !== process.pid);
  return {
    pid: child.pid ?? 0,
    port: Number(settings['PORT']),
    dbPort: Number(settings['DB_PORT']),
    dataDir,
    output: () => output,
    printed: async (pattern) => {
      while (!pattern.test(output)) {
        if (over) throw new Error(`It ended without saying ${String(pattern)}:\n${output}`);
        await new Promise<void>((resolve) => (changed = resolve));
      }
    },
    ended,
    processes,
    clear: async () => {
      if (!over) child.kill('SIGTERM');
      await ended;
      await Promise.all(processes().map(({ pid }) => endProcess(pid, 5_000)));
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}

function processesOf(dataDir: string): { pid: number; command: string }[] {
  const numbers = readdirSync('/proc').filter((name) => /^\d+$/.test(name));
  return numbers.flatMap((pid) => {
    const command = readProc(pid, 'cmdline');
    if (command === '' || !`${command} ${readProc(pid, 'environ')}`.includes(dataDir)) return [];
    return [{ pid: Number(pid), command }];
  });
}

/** Parts of a /proc file, by spaces; '' when the process is gone, has ended, or isn't ours to read. */
function readProc(pid: string, file: string): string {
  try {
    return readFileSync(`/proc/${pid}/${file}`, 'utf8').replaceAll('\0', ' ');
  } catch {
    return '';
  }
}
