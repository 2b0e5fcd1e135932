import type { Readiness } from '#server/capabilities/readiness/index.ts';
import type { Job } from '#server/platform/schedule/job.ts';

export const readinessWatch = (readiness: Readiness): Job => ({ name: 'readiness-watch', every: '*/10 * * * * *', run: (now) => readiness.watchAll(now) });
