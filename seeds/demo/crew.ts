import type { Call, CallsState } from '#shared/domain/calls/state.ts';
import { causesFor } from '#shared/domain/calls/causes.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { NewFact } from '#server/platform/journal/ledger.ts';
import { type Random, random } from '../../server/fakes/gateway/random.ts';

interface Incident {
  /** Id of the raise with which it begins. */
  id: string;
  from: number;
  until: number;
}

/**
 * What the mechanics of the demo's past did about the calls that are open up to an instant: each incident acknowledged, reached
 * and cleared at times of its own. A raise that comes after the clear of the one before it begins a new incident.
 */
export function crewFacts(calls: CallsState, until: number, mechanics: readonly Person[], words: readonly (string | number)[]): NewFact[] {
  return Object.values(calls.open).flatMap((call) => {
    const draw = random(...words, 'crew', call.key, call.raisedAt);
    return incidentsOf(call, draw)
      .filter((incident) => incident.until <= until)
      .flatMap((incident) => answered(call, incident, mechanics, draw));
  });
}

function incidentsOf(call: Call, draw: Random): Incident[] {
  const times = call.steps.filter((step) => step.kind === 'raised' || step.kind === 'joined').map((step) => step.at);
  const found: Incident[] = [];
  call.raises.forEach((raise, i) => {
    const from = times[i] ?? call.raisedAt;
    if (found.at(-1) && from <= (found.at(-1)?.until ?? 0)) return;
    const restart = call.stops.find((stop) => stop.from >= from)?.to;
    found.push({ id: raise.id, from, until: Math.round(Math.max(restart ?? 0, from + 130_000) + draw.around(40_000, 0.5)) });
  });
  return found;
}

function answered(call: Call, { id, from, until }: Incident, mechanics: readonly Person[], draw: Random): NewFact[] {
  const by = draw.pick(mechanics);
  const acknowledged = Math.min(until - 2000, Math.round(from + draw.around(42_000, 0.5)));
  const reached = Math.min(until - 1000, Math.round(acknowledged + draw.around(55_000, 0.4)));
  const causes = causesFor(call.equipment, call.safety, 'free-fall').filter((cause) => cause.counts === 'machine-stop' || call.equipment !== 'pinsetter');
  const cause = (causes.length > 0 ? draw.pick(causes) : undefined)?.code ?? 'other';
  const onLane: NewFact[] = draw.chance(0.93) ? [{ type: 'call.on-lane', data: { call: id }, by, at: reached }] : [];
  return [{ type: 'call.acknowledged', data: { call: id }, by, at: acknowledged }, ...onLane, { type: 'call.cleared', data: { call: id, cause }, by, at: until }];
}
