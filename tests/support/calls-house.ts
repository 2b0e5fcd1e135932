import { createHash } from 'node:crypto';
import type { CallDetail } from '#shared/contracts/calls.ts';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import { createCalls } from '#server/capabilities/calls/index.ts';
import { createCentre } from '#server/capabilities/centre/index.ts';
import { createNotices } from '#server/capabilities/notices/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { createLedger } from '#server/platform/journal/create-ledger.ts';
import { createLog } from '#server/platform/log.ts';
import { signedIn } from './actors.ts';
import { type Answer, ask } from './ask.ts';
import type { FixedClock } from './clock.ts';
import type { TestDatabase } from './db.ts';
import { startWeb, testConfig } from './web.ts';

const log = createLog('silent');
let told = 0;

/** Calls over HTTP upon a real database: everything that the slice stands on, on a free port. */
export async function callsHouse({ db }: TestDatabase, clock: FixedClock) {
  const config = { ...testConfig, publicUrl: 'https://lanes.example' };
  const ledger = createLedger({ db, clock });
  const centres = createCentre({ db, ledger, log, clock });
  const notices = createNotices({ db, clock, log }, null);
  const mailed: string[] = ['manager@house.test'];
  const calls = createCalls({ db, ledger, config }, { centre: centres, notices, managers: async () => mailed });
  const web = await startWeb(db, { clock, routes: calls.routes });

  /** A house with somebody of each role signed in. Passwords are slow on purpose: tests share one and take lanes of their own. */
  async function house({ family = 'free-fall', lanes = 12 }: { family?: 'free-fall' | 'string'; lanes?: number } = {}) {
    told += 1;
    const centre: CentreRef = await centres.add({ slug: `calls-${process.pid}-${told}`, name: 'Tarn Ferry Bowl', zone: 'Europe/Berlin', lanes, family });
    const come = (role: 'mechanic' | 'desk' | 'manager') => signedIn(web.url, web.accounts, { centre, role });
    const [mechanic, other, desk, manager] = [await come('mechanic'), await come('mechanic'), await come('desk'), await come('manager')];
    const post = (who: { cookie: string }, path: string, body?: unknown, headers?: Record<string, string>): Promise<Answer> =>
      ask(web.url, 'POST', `/api/centres/${centre.slug}/calls${path}`, { cookie: who.cookie, body, headers });
    const get = (who: { cookie: string }, path = ''): Promise<Answer> => ask(web.url, 'GET', `/api/centres/${centre.slug}/calls${path}`, { cookie: who.cookie });
    /** Something a gateway reports, at the clock's time unless said otherwise. */
    const device = <T extends keyof DeviceData>(type: T, data: DeviceData[T], time = clock.now()) => {
      told += 1;
      const id = `event-${told}`;
      const raw = { source: 'gateway/test', id, type, data };
      return ledger.submit(centre, [{ source: 'gateway/test', id, type, time, raw, hash: createHash('sha256').update(JSON.stringify(raw)).digest(), gateway: { id: 'g1', name: 'Back end' }, data, reason: null }], clock.now());
    };
    const stop = async (lane: number): Promise<CallDetail> => {
      await device('pinsetter.stopped', { lane });
      const open = (await get(desk)).body as { open: { id: string; lane: number }[] };
      return seen(await get(desk, `/${open.open.find((one) => one.lane === lane)?.id}`));
    };
    return { centre, mechanic, other, desk, manager, post, get, device, stop };
  }
  const close = async (): Promise<void> => {
    await web.close();
    await centres.stop();
  };
  return { house, close, calls, ledger, mailed, db, url: web.url };
}
export type CallsHouse = Awaited<ReturnType<typeof callsHouse>>;

/** The call of an answer that must have gone well. */
export function seen(answer: Answer): CallDetail {
  if (answer.status !== 200 && answer.status !== 201) throw new Error(`${answer.status} ${JSON.stringify(answer.body)}`);
  return answer.body as CallDetail;
}

/** Status and code of a refusal, with its parameters. */
export const refusal = ({ status, body }: Answer): { status: number; code: string; params: Record<string, unknown> } => {
  const problem = body as { code: string; params: Record<string, unknown> };
  return { status, code: problem.code, params: problem.params };
};
