// What was started, and how it ends: last first, whenever TERM, ctrl-C or a failure comes.
import { endSteps } from './steps.mjs';

const ends = [];
let asked = false;
let refuse;

/** Rejects when a stop is asked for; race what may take long against it. */
export const stopAsked = new Promise((_resolve, reject) => {
  refuse = reject;
});
stopAsked.catch(() => {});

export const isStopAsked = () => asked;

/** Asks for the stop: a step that runs is ended, and whatever starts next is undone at once. */
export function askToStop() {
  asked = true;
  endSteps();
  refuse(new Error('Stop asked for'));
}

/** Notes how something that now runs ends. Throws when a stop was asked for meanwhile. */
export async function keep(end) {
  ends.push(end);
  if (asked) await stopAsked;
}

/** Ends all that is kept, last first. */
export async function unwind() {
  for (let end = ends.pop(); end !== undefined; end = ends.pop()) await end();
}
