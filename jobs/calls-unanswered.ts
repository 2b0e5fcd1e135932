import type { Calls } from '#server/capabilities/calls/index.ts';
import type { Job } from '#server/platform/schedule/job.ts';

export const mailUnansweredCalls = (calls: Calls): Job => ({
  name: 'calls-unanswered',
  every: '*/10 * * * * *',
  run: async (now) => { await calls.mailUnanswered(now); },
});
