import type { Numbers } from '#server/capabilities/numbers/index.ts';
import type { Job } from '#server/platform/schedule/job.ts';

export const nightReport = (numbers: Numbers): Job => ({
  name: 'night-report',
  every: '30 * * * * *',
  run: (now) => numbers.issueDue(now),
});
