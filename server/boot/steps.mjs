// Saying what happens, running a program as a step, and stopping for a reason that people can act on.
import { spawn } from 'node:child_process';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of the checkout. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');

/** A reason to stop that is ours to explain: printed without a stack. */
export class StopError extends Error {}

/** Lines for people, on standard output. */
export const say = (text) => process.stdout.write(`${text}\n`);
/** The same on standard error, where standard output is the answer itself. */
export const sayAside = (text) => process.stderr.write(`${text}\n`);

const running = new Set();

/** Runs a program to its end with our terminal; resolves to its exit code. */
export function runToEnd(command, args, { env = process.env, stdio = 'inherit' } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd: root, env, stdio });
    running.add(child);
    child.once('error', (error) => reject(new StopError(`${command} can't be run: ${error.message}`)));
    child.once('close', (code) => {
      running.delete(child);
      resolve(code ?? 1);
    });
  });
}

/** Like `runToEnd`, but anything but success stops the start. */
export async function step(text, command, args, options) {
  (options?.tell ?? say)(text);
  const code = await runToEnd(command, args, options);
  if (code !== 0) throw new StopError(`'${[command, ...args].join(' ')}' failed (exit ${code}).`);
}

/** Passes TERM on to whatever step runs. */
export function endSteps() {
  for (const child of running) child.kill('SIGTERM');
}

/** The environment without what npm adds for the script it runs: a nested npm would take it for its own settings. */
export function withoutNpm(env = process.env) {
  return Object.fromEntries(
    Object.entries(env).filter(([name]) => !/^npm_(lifecycle|package|command|config_(global|prefix|local_prefix|dry_run|ignore_scripts|omit|include|production|workspaces?))/i.test(name)),
  );
}

/** Runs an entry: its result is the exit code; a `StopError` is told plainly, any other with its stack. */
export async function runEntry(main) {
  try {
    process.exitCode = await main();
  } catch (error) {
    sayAside(error instanceof StopError ? error.message : error.stack);
    process.exitCode = 1;
  }
}
