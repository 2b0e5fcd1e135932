import { Link } from 'react-router-dom';
import type { CallView, SessionBar } from '#shared/contracts/floor.ts';
import { callPlace, callTitle } from '#shared/text/en/calls.ts';
import { callWho, levelsText, pipsText, verdictNames } from '#shared/text/en/floor.ts';
import { floorWords } from '#shared/text/en/floor-page.ts';
import { number, percent, timeOfDay } from '#shared/text/en/formats.ts';
import { useNow } from '../../../lib/clock.ts';
import { type BadgeTone, LaneBadge, Mark, Pips } from '../../../ui/marks.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { RunningClock } from '../../../ui/running-clock.tsx';
import { Fact, Facts } from '../../../ui/table.tsx';
import { useBoard } from '../board-context.ts';

/** A machine that runs again only lacks its cause: paperwork, not an alarm. */
export const waitsForSomebody = (call: CallView): boolean => call.status === 'unanswered' && call.returnedAt === null;
export const toneOf = (call: CallView): BadgeTone => (call.mechanicIn ? 'mechanic-in' : waitsForSomebody(call) ? 'unanswered' : call.returnedAt !== null ? 'outline' : call.status === 'acknowledged' || call.status === 'on-lane' ? 'answered' : 'plain');

interface Addresses {
  call: ((call: string) => string) | null;
  session: ((session: string) => string) | null;
}

/** Beside the plan: open calls, what comes next, tonight's figures, machines and gateways that need a look. */
export function Side({ addresses }: { addresses: Addresses }) {
  return (
    <div className="flex flex-col gap-5">
      <Calls address={addresses.call} />
      <NextSessions address={addresses.session} />
      <Tonight />
      <Machines />
    </div>
  );
}

export function Calls({ address }: { address: Addresses['call'] }) {
  const calls = useBoard('calls') ?? [];
  const now = useNow(15_000);
  return (
    <section>
      <PartTitle note={calls.length > 0 ? floorWords.open(calls.length) : null}>{floorWords.calls}</PartTitle>
      {calls.length === 0 ? <p className="border-t border-rule py-2 text-dim">{floorWords.noCalls}</p> : null}
      <ul>
        {calls.map((call) => (
          <li key={call.id} data-call={call.id} className="grid grid-cols-[2.75rem_minmax(0,1fr)] gap-x-3 border-t border-rule py-2.5">
            <LaneBadge lane={call.scope === 'house' ? '–' : call.lane} tone={toneOf(call)} />
            <div className="min-w-0">
              <div className="flex items-baseline justify-between gap-3">
                <b className="min-w-0 leading-tight font-[680]">
                  {address ? (
                    <Link to={address(call.id)} className="hover:underline">
                      {callTitle(call)}
                    </Link>
                  ) : (
                    callTitle(call)
                  )}
                </b>
                <span className={waitsForSomebody(call) ? 'whitespace-nowrap text-red' : 'whitespace-nowrap'}>
                  {waitsForSomebody(call) ? <Mark kind="unanswered" size={12} className="mr-1" /> : null}
                  <RunningClock since={call.raisedAt} className="type-clock text-[1.1875rem]" />
                </span>
              </div>
              <span className="type-label block leading-snug">{[callPlace(call), call.playing].filter(Boolean).join(' · ')}</span>
              <span className="block text-[0.8125rem] leading-snug font-[560]">{callWho(call, now)}</span>
            </div>
          </li>
        ))}
      </ul>
    </section>
  );
}

const SHOWN = 3;
export function NextSessions({ address }: { address: Addresses['session'] }) {
  const zone = useBoard('centre')?.zone ?? 'UTC';
  const coming = (useBoard('sessions') ?? []).filter((s) => s.phase === 'next' || s.phase === 'later').sort((a, b) => a.startAt - b.startAt);
  return (
    <section>
      <PartTitle>{floorWords.nextSessions}</PartTitle>
      {coming.length === 0 ? <p className="border-t border-rule py-2 text-dim">{floorWords.noSessions}</p> : null}
      <ul>
        {coming.slice(0, SHOWN).map((session) => (
          <NextSession key={session.id} session={session} zone={zone} address={address?.(session.id) ?? null} />
        ))}
      </ul>
      {coming.length > SHOWN ? <p className="type-label">{floorWords.moreSessions(coming.length - SHOWN)}</p> : null}
    </section>
  );
}

function NextSession({ session, zone, address }: { session: SessionBar; zone: string; address: string | null }) {
  const verdict = session.verdict;
  const tone = verdict === 'held' ? 'text-red' : verdict === 'at-risk' ? 'text-amber' : verdict === 'ready' ? 'text-green' : 'text-ink';
  return (
    <li className="border-t border-rule py-2.5">
      <div className="flex items-baseline justify-between gap-3">
        <b className="min-w-0 font-[680]">{address ? <Link to={address} className="hover:underline">{session.name}</Link> : session.name}</b>
        <span className="type-label whitespace-nowrap">{floorWords.startWarmUp(timeOfDay(session.startAt, zone), timeOfDay(session.warmUpAt, zone))}</span>
      </div>
      {verdict || session.says ? (
        <p className="mt-0.5 mb-2 text-sm leading-snug">
          {verdict ? <b className={`font-[700] ${tone}`}>{verdictNames[verdict]}</b> : null}
          {session.says ? <span className="text-dim"> {session.says}</span> : null}
        </p>
      ) : null}
      {session.lanes.length > 0 ? <Pips states={session.lanes.map((l) => l.state)} label={pipsText(session)} /> : null}
    </li>
  );
}

export function Tonight() {
  const tonight = useBoard('tonight');
  if (!tonight) return null;
  return (
    <section>
      <PartTitle>{floorWords.tonight}</PartTitle>
      <Facts>
        <Fact term={floorWords.lanesInUse} note={floorWords.of(tonight.lanes)}>{number(tonight.inUse)}</Fact>
        <Fact term={floorWords.occupancy}>{tonight.occupancyPct === null ? '–' : percent(tonight.occupancyPct)}</Fact>
        <Fact term={floorWords.frames} note={tonight.framesEstimated > 0 ? floorWords.estimated(tonight.framesEstimated) : null}>{number(tonight.frames)}</Fact>
        <Fact term={floorWords.rate} note={tonight.rate ? floorWords.interval(tonight.rate.low, tonight.rate.high) : null}>{tonight.rate ? number(tonight.rate.perThousand, 2) : '–'}</Fact>
      </Facts>
    </section>
  );
}

/** Levels of the lane machines as last told, and gateways that are silent or wrong: quiet lines, only where there is something. */
export function Machines() {
  const machines = useBoard('machines') ?? [];
  const gateways = (useBoard('gateways') ?? []).filter((g) => g.silent || g.clockErrorMs !== null || g.missing !== null || g.faults.length > 0);
  const zone = useBoard('centre')?.zone ?? 'UTC';
  return (
    <>
      {machines.length > 0 ? (
        <section>
          <PartTitle>{floorWords.machines}</PartTitle>
          <dl>
            {machines.map((m) => (
              <div key={m.code} data-machine={m.code} className="border-t border-rule py-2">
                <dt className="flex justify-between gap-3 font-[620]">
                  {m.name}
                  {m.at === null ? null : <span className="type-label">{floorWords.levelsAt(timeOfDay(m.at, zone))}</span>}
                </dt>
                <dd className="type-label">{levelsText(m) || floorWords.levelsUnknown}</dd>
              </div>
            ))}
          </dl>
        </section>
      ) : null}
      {gateways.length > 0 ? (
        <section>
          <PartTitle>{floorWords.gateways}</PartTitle>
          <ul>
            {gateways.map((g) => (
              <li key={g.name} className="border-t border-rule py-2 text-sm">
                <b className="font-[620]">{g.name}</b>{' '}
                <span className="text-amber">
                  {[
                    g.silent ? floorWords.silent(g.heardAt === null ? null : timeOfDay(g.heardAt, zone)) : null,
                    g.clockErrorMs === null ? null : floorWords.clockError(number(g.clockErrorMs / 1000, 1)),
                    g.missing === null ? null : floorWords.missing(g.missing),
                    ...g.faults,
                  ].filter(Boolean).join(' · ')}
                </span>
              </li>
            ))}
          </ul>
        </section>
      ) : null}
    </>
  );
}
