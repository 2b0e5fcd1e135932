import { createNotices } from '#server/capabilities/notices/index.ts';
import { systemClock } from '#server/platform/clock.ts';
import { createDatabase } from '#server/platform/db/database.ts';
import { createLog } from '#server/platform/log.ts';
import { createPostman } from '#server/platform/mail/postman.ts';

/** A process that sends what is due and is killed after the SMTP server has taken the first letter, before it is marked. */
const [databaseUrl = '', smtpUrl = ''] = process.argv.slice(2);
const postman = createPostman(smtpUrl);
const notices = createNotices({ db: createDatabase(databaseUrl), clock: systemClock, log: createLog('silent') }, {
  async send(letter) {
    await postman.send(letter);
    process.kill(process.pid, 'SIGKILL');
    await new Promise(() => {});
  },
  close: () => postman.close(),
});
await notices.sendDue(systemClock.now());
