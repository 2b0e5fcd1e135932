import type { CallDetail } from '#shared/contracts/calls.ts';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import { signedIn } from './actors.ts';
import { type Answer, ask } from './ask.ts';
import { aCentre, type CentreGiven } from './builders.ts';
import { aDevice } from './device.ts';
import type { TestServer } from './server.ts';

/** A house with somebody of each role signed in, and its gateway. Passwords are slow on purpose: tests share a house and take lanes of their own. */
export async function callsHouse(server: TestServer, given: CentreGiven = {}) {
  const centre = await aCentre(server.slices.centre, { lanes: 12, name: 'Tarn Ferry Bowl', zone: 'Europe/Berlin', ...given });
  const come = (role: 'mechanic' | 'desk' | 'manager') => signedIn(server.url, server.slices.accounts, { centre, role });
  const [mechanic, other, desk, manager] = [await come('mechanic'), await come('mechanic'), await come('desk'), await come('manager')];
  const gateway = await aDevice(server, centre);
  const at = `/api/centres/${centre.slug}/calls`;
  const post = (who: { cookie: string }, path: string, body?: unknown, headers?: Record<string, string>): Promise<Answer> =>
    ask(server.url, 'POST', `${at}${path}`, { cookie: who.cookie, body, headers });
  const get = (who: { cookie: string }, path = ''): Promise<Answer> => ask(server.url, 'GET', `${at}${path}`, { cookie: who.cookie });
  let told = 0;
  /** Something the gateway reports, at the clock's time; ids keep what is told within one millisecond in its order. */
  async function device<T extends keyof DeviceData>(type: T, data: DeviceData[T]): Promise<void> {
    told += 1;
    const { body } = await gateway.sendOne({ type, data, id: `told-${String(told).padStart(6, '0')}` });
    if (body.accepted !== 1) throw new Error(`not accepted: ${JSON.stringify(body)}`);
  }
  const openOn = async (lane: number): Promise<CallDetail[]> => ((await get(desk)).body as { open: CallDetail[] }).open.filter((call) => call.lane === lane || call.lanesHeld.includes(lane));
  async function stop(lane: number): Promise<CallDetail> {
    await device('pinsetter.stopped', { lane });
    return seen(await get(desk, `/${(await openOn(lane)).find((call) => call.equipment === 'pinsetter')?.id}`));
  }
  return { centre, mechanic, other, desk, manager, gateway, post, get, device, openOn, stop };
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
