// A process of ours that is kept running: started again when it dies, ended in order. It ends itself when our channel closes.
import { spawn } from 'node:child_process';
import path from 'node:path';
import { isAlive, pause } from './processes.mjs';
import { root, say } from './steps.mjs';

const FIRST_PAUSE_MS = 500;
const LONGEST_PAUSE_MS = 10_000;
/** A process that ran this long is taken for sound: its next death begins with the shortest pause again. */
const SOUND_AFTER_MS = 30_000;
/** Deaths in a row that are told. */
const TOLD = 3;
const STOP_WITHIN_MS = 10_000;

/**
 * Starts `file` (TypeScript) and keeps it running. `output` is what spawn takes
 * for standard output and error, `patienceMs` how long it may take to end. `onMessage` hears what it sends; `onFirstExit`
 * decides about a death before `settle()` was called: then it isn't started again.
 */
export function keepRunning({ name, file, args = [], env, output, patienceMs = STOP_WITHIN_MS, onMessage = () => {}, onFirstExit = () => {} }) {
  let settled = false;
  let current;
  let failures = 0;
  let timer;
  let over = false;
  let turn = Promise.resolve();

  const launch = () => {
    const child = spawn(process.execPath, ['--import', 'tsx', path.join(root, file), ...args], {
      cwd: root,
      env,
      detached: true, // its own group, so that ctrl-C in the terminal reaches us alone and we end it in order
      stdio: ['ignore', output, output, 'ipc'],
    });
    const run = { child, began: Date.now(), unwanted: false };
    current = run;
    child.on('message', onMessage);
    child.once('error', (error) => say(`${name} can't be started: ${error.message}`));
    child.once('exit', (code, signal) => {
      if (!run.unwanted) died(run, signal ?? `exit ${code}`);
    });
  };
  const died = (run, how) => {
    if (!settled) {
      onFirstExit(how);
      return;
    }
    if (Date.now() - run.began > SOUND_AFTER_MS) failures = 0;
    const wait = Math.min(FIRST_PAUSE_MS * 2 ** failures, LONGEST_PAUSE_MS);
    failures += 1;
    if (failures <= TOLD) say(`${name} stopped (${how}); starting it again${failures === TOLD ? ', and no more said about it until it has run for a while' : ''}`);
    timer = setTimeout(launch, wait);
  };
  const halt = async () => {
    clearTimeout(timer);
    current.unwanted = true;
    await end(current.child, patienceMs);
  };

  launch();
  return {
    /** From now on it is started again when it dies. */
    settle: () => {
      settled = true;
    },
    /** Ends it for good. */
    stop: async () => {
      over = true;
      await turn;
      await halt();
    },
    /** Ends it and starts it anew at once; one after the other when asked again meanwhile. */
    restart: () => {
      turn = turn.then(async () => {
        if (!over) await halt();
        if (!over) launch();
      });
      return turn;
    },
  };
}

/** TERM to the process; after a while KILL to all of its group. */
async function end(child, patienceMs) {
  if (child?.pid === undefined) return;
  const until = Date.now() + patienceMs;
  if (child.exitCode === null && child.signalCode === null) child.kill('SIGTERM');
  while (isAlive(child.pid) && Date.now() < until) await pause(20);
  try {
    process.kill(-child.pid, 'SIGKILL'); // it, if it didn't listen, and whatever it left behind
  } catch {
    // nothing was left
  }
  while (isAlive(child.pid)) await pause(20);
}
