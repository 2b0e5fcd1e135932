import type { Notices } from '#server/capabilities/notices/index.ts';
import type { Job } from '#server/platform/schedule/job.ts';

export const sendMail = (notices: Notices): Job => ({
  name: 'send-mail',
  every: '*/5 * * * * *',
  run: async (now) => { await notices.sendDue(now); },
});
