import { plural } from './formats.ts';
import { ruleSentences } from './plan.ts';
import type { Sentences } from './sentences.ts';

export const refusals: Sentences = {
  'machine.unknown': ({ machine }) => `The centre has no lane machine “${machine}”.`,
  'machine.code-taken': ({ machine }) => `The code “${machine}” belongs to another machine.`,
  'pattern.unknown': ({ pattern }) => `The centre has no pattern “${pattern}”, or not that revision.`,
  'pattern.code-taken': ({ pattern }) => `The code “${pattern}” belongs to another pattern.`,
  'pattern.unchanged': ({ revision }) => `That is what revision ${revision} says already. Change something, or leave it.`,
  'pattern.invalid': ({ count }) => `${plural(Number(count), 'contradiction')} in the pattern: see the marked fields. Nothing was saved.`,
  'run.unknown': () => 'There is no such run.',
  'run.not-planned': ({ run }) => `Run ${run} is no longer planned, so it can’t be taken back.`,
  'run.code-taken': ({ run }) => `This machine has had a run ${run} already. Choose another code, or leave it empty.`,
  'run.broken-off-twice': ({ lane }) => `A run breaks off on one lane. Lane ${lane} is a second one: say it was skipped, or record two runs.`,
  'run.lanes-unknown': ({ lane }) => `The house has no lane ${lane}.`,
  'run.lane-twice': ({ lane }) => `Lane ${lane} is named twice.`,
  'run.machine-cannot': ({ machine, pattern }) => `${machine} can’t lay ${pattern}. The reasons stand below; choose another machine or pattern.`,
  'run.start-past': () => 'That start has passed. Choose a later one, or record the run as made.',
  'run.end-before-start': () => 'The end lies before the start.',
  'run.end-in-future': () => 'The end lies in the future. Plan the run instead.',
  'run.too-old': () => 'That is more than seven days ago; such a run can’t be recorded any more.',
  'run.date-invalid': () => 'That is no date. Write it as 2026-05-14.',
  ...ruleSentences,
};
