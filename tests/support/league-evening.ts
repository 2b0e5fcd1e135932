import type { LeagueForm } from '#shared/contracts/leagues.ts';
import { wallOf, weekdayOf } from '#shared/domain/business-day.ts';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import { signedIn } from './actors.ts';
import { aCentre } from './builders.ts';
import { aDevice } from './device.ts';
import type { TestServer } from './server.ts';

const MIN = 60_000;
const REVISION = { lengthFt: 40, passes: [{ direction: 'outbound' as const, fromBoard: { side: 'L' as const, n: 2 }, toBoard: { side: 'R' as const, n: 2 }, loads: 4, ul: 45, product: 'A' as const, fromFt: 0, toFt: 30 }] };

/** A zone in which it is about six in the evening now: a business day is far from its cut. */
export function eveningZone(now: number): string {
  const east = (18 - new Date(now).getUTCHours() + 36) % 24 - 12;
  // Etc zones are signed the other way: Etc/GMT-2 lies two hours east of Greenwich.
  return east === 0 ? 'UTC' : `Etc/GMT${east > 0 ? '-' : '+'}${Math.abs(east)}`;
}

/** A house an hour before its league: lanes 5–8 dressed as asked, 1–4 and 9–12 too, somebody of each role signed in. */
export async function leagueEvening(server: TestServer) {
  const { slices } = server;
  const now = server.deps.clock.now();
  const zone = eveningZone(now);
  const centre = await aCentre(slices.centre, { lanes: 12, name: 'Tarn Ferry Bowl', zone });
  await slices.runs.addPattern(centre, { code: 'owls', name: 'Night Owls', revision: REVISION, by: 'test' });
  const start = wallOf(now + 65 * MIN, zone);
  const form: LeagueForm = {
    name: 'Night Owls', weekday: weekdayOf(start.date), startMinutes: start.minutes, warmUpMinutes: 10, fromLane: 5, toLane: 8, teams: 4, bowlersATeam: 4, games: 3, absent: 0,
    crossesLanes: true, firstDate: start.date, lastDate: start.date, skipDates: [], pattern: 'owls', revision: 1, fresh: false, sanctioned: false,
  };
  const league = await slices.leagues.createLeague(centre, form);
  const [session] = await slices.leagues.sessionsOfDate(centre, start.date);
  if (!session) throw new Error('the league made no session');
  const come = (role: 'desk' | 'manager') => signedIn(server.url, slices.accounts, { centre, role });
  const secretary = await signedIn(server.url, slices.accounts, { centre, role: 'secretary', leagues: [league] });
  const [desk, manager] = [await come('desk'), await come('manager')];
  const gateway = await aDevice(server, centre);
  const device = async <T extends keyof DeviceData>(type: T, data: DeviceData[T] | object, time?: number): Promise<void> => {
    const { body } = await gateway.sendOne({ type, data, time });
    if (body.accepted !== 1) throw new Error(`not accepted: ${JSON.stringify(body)}`);
  };
  const lanes = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12];
  await device('run.started', { machine: 'm1', run: '117', pattern: 'owls', revision: 1, lanes }, now - 30 * MIN);
  for (const [i, lane] of lanes.entries()) {
    const at = now - (29 - 2 * i) * MIN;
    await device('run.lane.dressed', { machine: 'm1', run: '117', lane, startedAt: new Date(at - MIN).toISOString(), finishedAt: new Date(at).toISOString() }, at);
  }
  await device('run.finished', { machine: 'm1', run: '117' }, now - 5 * MIN);
  return { centre, league, session, secretary, desk, manager, device, form };
}
export type LeagueEvening = Awaited<ReturnType<typeof leagueEvening>>;
