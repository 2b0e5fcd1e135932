import type { CheckName, Params } from '../../domain/readiness/check.ts';
import type { SafetyKind } from '../../domain/equipment.ts';
import { equipmentNames, safetyNames } from './calls.ts';
import { dayOfDate, lanesText, listed, plural } from './formats.ts';

/** `19:42` of an instant in the centre's zone. */
export type Clock = (at: number) => string;

export interface SaidCheck {
  check: CheckName;
  code: string;
  params: Params;
  waitsFor: { kind: 'run' | 'mechanic' | 'people' | 'desk'; name: string | null } | null;
}

export const checkNames: Record<CheckName, string> = {
  'pattern': 'Pattern and its age', 'run-complete': 'Run complete', 'machine': 'Lane machine for the run', 'lane-free': 'Lane free in time', 'pinsetter': 'Pinsetter and its calls',
  'repeated-stops': 'Repeated stops', 'other-equipment': 'Other equipment of lane and pair', 'bumpers': 'Bumpers', 'certificate': 'Certificate and family',
};

const text = (params: Params, name: string): string => String(params[name] ?? '');
const count = (params: Params, name: string): number => Number(params[name] ?? 0);
const somebody = (params: Params): string => text(params, 'mechanic') || 'a mechanic';
const equipment = (params: Params): string => equipmentNames[text(params, 'equipment') as keyof typeof equipmentNames] ?? text(params, 'equipment');
const people = (params: Params): string => text(params, 'name') || 'the people on it';

interface Wording {
  /** In a cell of the table. */
  cell: (params: Params, clock: Clock) => string;
  /** After "Lane 31 ", one or more lanes; null: the cell says all there is. */
  says: ((params: Params, clock: Clock, many: boolean) => string) | null;
}
const fine = (cell: Wording['cell']): Wording => ({ cell, says: null });
const be = (many: boolean): string => (many ? 'are' : 'is');
const has = (many: boolean): string => (many ? 'have' : 'has');
const mustBe = (params: Params, clock: Clock): string =>
  count(params, 'byAt') === 0 ? '' : count(params, 'dress') === 1 ? ` and must be dressed by ${clock(count(params, 'byAt'))}` : ` and must run by ${clock(count(params, 'byAt'))}`;
const planBy = (params: Params, clock: Clock): string => (count(params, 'byAt') > 0 ? `; no run is planned, it must be done by ${clock(count(params, 'byAt'))}` : '');

const PATTERN: Record<string, Wording> = {
  'pattern.dressed': fine((p, clock) => (count(p, 'deliveries') > 0 ? `Dressed ${clock(count(p, 'dressedAt'))}, ${plural(count(p, 'deliveries'), 'delivery', 'deliveries')} by warm-up` : `Dressed ${clock(count(p, 'dressedAt'))}`)),
  'pattern.never-dressed': { cell: () => 'Not dressed', says: (p, clock, many) => `${be(many)} not dressed${planBy(p, clock)}` },
  'pattern.other': { cell: (p) => `Has ${text(p, 'pattern')}, revision ${text(p, 'revision')}`, says: (p, clock, many) => `${has(many)} another pattern, ${text(p, 'pattern')} revision ${text(p, 'revision')}${planBy(p, clock)}` },
  'pattern.unverified': { cell: () => 'Pattern unverified', says: (p, clock, many) => `${has(many)} a pattern that nobody has verified${planBy(p, clock)}` },
  'pattern.worn': { cell: (p) => `Worn: ${plural(count(p, 'deliveries'), 'delivery', 'deliveries')}, ${count(p, 'hours')} h`, says: (p, clock, many) => `${be(many)} worn by warm-up (${plural(count(p, 'deliveries'), 'delivery', 'deliveries')}, ${count(p, 'hours')} h)${planBy(p, clock)}` },
  'pattern.played-on': {
    cell: (p) => `Not fresh: ${plural(count(p, 'deliveries'), 'delivery', 'deliveries')} by others`,
    says: (p, clock, many) => `${be(many)} to be fresh, but others roll ${plural(count(p, 'deliveries'), 'delivery', 'deliveries')} on ${many ? 'them' : 'it'} (at most ${count(p, 'tolerance')})${planBy(p, clock)}`,
  },
  'pattern.after-repair': { cell: (p, clock) => `After repair, ${clock(count(p, 'repairedAt'))}`, says: (p, clock, many) => `must be dressed again after ${many ? 'their' : 'its'} repair${planBy(p, clock)}` },
  'pattern.broken-off': { cell: () => 'Run broken off', says: (p, clock, many) => `must be cleaned and dressed again: run ${text(p, 'run')} broke off on ${many ? 'them' : 'it'}${planBy(p, clock)}` },
  'pattern.run-other': { cell: (p) => `Run ${text(p, 'run')} lays ${text(p, 'pattern')}`, says: (p, _clock, many) => `get${many ? '' : 's'} another pattern: run ${text(p, 'run')} lays ${text(p, 'pattern')}` },
  'pattern.run-unverified': { cell: (p) => `Run ${text(p, 'run')}, pattern unverified`, says: (p, _clock, many) => `wait${many ? '' : 's'} for run ${text(p, 'run')}, whose pattern nobody has verified` },
  'pattern.run-late': { cell: (p, clock) => `Run ${text(p, 'run')}, done ${clock(count(p, 'doneAt'))}: too late`, says: (p, clock) => `will be dressed at ${clock(count(p, 'doneAt'))}, after warm-up` },
  'pattern.run-tight': { cell: (p, clock) => `Run ${text(p, 'run')}, done ${clock(count(p, 'doneAt'))}: tight`, says: (p, clock) => `will be dressed at ${clock(count(p, 'doneAt'))}, which is tight` },
  'pattern.being-dressed': { cell: (p, clock) => `Being dressed, done ${clock(count(p, 'doneAt'))}`, says: (p, clock) => `will be at ${clock(count(p, 'doneAt'))}` },
  'pattern.run-planned': { cell: (p, clock) => `Run ${text(p, 'run')}, done ${clock(count(p, 'doneAt'))}`, says: (p, clock) => `will be at ${clock(count(p, 'doneAt'))}` },
};

const RUN_AND_LANE: Record<string, Wording> = {
  'run.complete': fine(() => 'OK'),
  'run.broken-off': { cell: () => 'Broken off', says: (p, clock, many) => `must be cleaned and dressed again: run ${text(p, 'run')} broke off on ${many ? 'them' : 'it'}${planBy(p, clock)}` },
  'machine.not-needed': fine(() => 'OK'),
  'machine.fine': fine(() => 'OK'),
  'machine.stands': { cell: (p) => `${text(p, 'machine')} stands`, says: (p, _clock, many) => `wait${many ? '' : 's'} for run ${text(p, 'run')}, but ${text(p, 'machine')} has said nothing for a while` },
  'machine.call-open': { cell: () => 'Call for a lane machine', says: (p, _clock, many) => `wait${many ? '' : 's'} for ${text(p, 'machine')}, and a lane machine has an open call` },
  'machine.battery-low': { cell: (p) => `${text(p, 'machine')}: battery low`, says: (p, _clock, many) => `wait${many ? '' : 's'} for ${text(p, 'machine')}, whose battery is low` },
  'machine.tank-short': { cell: (p) => `${text(p, 'machine')}: tank too low`, says: (p, _clock, many) => `wait${many ? '' : 's'} for ${text(p, 'machine')}, whose conditioner won’t last that far` },
  'lane.free': fine(() => 'Free'),
  'lane.frees': { cell: (p, clock) => `Free ${clock(count(p, 'freeAt'))}`, says: (p, clock, many) => `${be(many)} free at ${clock(count(p, 'freeAt'))}, after ${people(p)}` },
  'lane.end-unknown': { cell: () => 'In use, end unknown', says: (p, clock, many) => `${be(many)} in use by ${people(p)} without a known end, and must be free by ${clock(count(p, 'neededAt'))}` },
  'lane.free-tight': { cell: (p, clock) => `Free ${clock(count(p, 'freeAt'))}: tight`, says: (p, clock, many) => `${be(many)} free at about ${clock(count(p, 'freeAt'))}, after ${people(p)}, and must be by ${clock(count(p, 'neededAt'))}` },
  'lane.free-late': { cell: (p, clock) => `Free ${clock(count(p, 'freeAt'))}: too late`, says: (p, clock, many) => `${be(many)} free at ${clock(count(p, 'freeAt'))} only, after ${people(p)}, and must be by ${clock(count(p, 'neededAt'))}` },
};

const MACHINES: Record<string, Wording> = {
  'pinsetter.fine': fine(() => 'OK'),
  'pinsetter.cause-missing': fine(() => 'OK, cause missing'),
  'pinsetter.stopped': { cell: (p, clock) => `Stopped ${clock(count(p, 'sinceAt'))}`, says: (p, clock, many) => `${has(many)} stopped${mustBe(p, clock)}` },
  'pinsetter.unanswered': { cell: () => 'Call unanswered', says: (p, clock, many) => `wait${many ? '' : 's'} for a mechanic${mustBe(p, clock)}; nobody has answered` },
  'pinsetter.coming': { cell: (p) => `${somebody(p)} on the way`, says: (p, clock, many) => `wait${many ? '' : 's'} for ${somebody(p)}, on the way,${mustBe(p, clock)}`.replace(/,$/, '') },
  'pinsetter.on-lane': { cell: (p) => `${somebody(p)} on lane`, says: (p, clock, many) => `wait${many ? '' : 's'} for ${somebody(p)}, on lane,${mustBe(p, clock)}`.replace(/,$/, '') },
  'pinsetter.mechanic-in': { cell: () => 'Mechanic in machine', says: (p, clock, many) => `wait${many ? '' : 's'} for the mechanic${mustBe(p, clock)}` },
  'pinsetter.parked': { cell: (p, clock) => `Parked till ${clock(count(p, 'untilAt'))}`, says: (p, clock, many) => `${has(many)} a call parked till ${clock(count(p, 'untilAt'))}${mustBe(p, clock)}` },
  'pinsetter.out-of-service': { cell: () => 'Out of service', says: (p, clock, many) => `${be(many)} out of service (${text(p, 'reason')})${mustBe(p, clock)}` },
  'stops.few': fine(() => 'OK'),
  'stops.repeated': { cell: (p) => `${count(p, 'stops')} stops in ${count(p, 'frames')} frames`, says: (p, _clock, many) => `stopped ${count(p, 'stops')} times in the last ${count(p, 'frames')} frames${many ? ' each' : ''}` },
};

const otherSays = (tail: string) => (p: Params, clock: Clock, many: boolean): string =>
  `${has(many)} a call on the ${equipment(p)}, ${tail}${count(p, 'byAt') > 0 ? `; it must be settled by ${clock(count(p, 'byAt'))}` : ''}`;
const OTHERS: Record<string, Wording> = {
  'other.fine': fine(() => 'OK'),
  'other.unanswered': { cell: (p) => `${equipment(p)}: unanswered`, says: otherSays('unanswered') },
  'other.coming': { cell: (p) => `${equipment(p)}: ${somebody(p)} on the way`, says: otherSays('a mechanic is on the way') },
  'other.on-lane': { cell: (p) => `${equipment(p)}: ${somebody(p)} on lane`, says: otherSays('a mechanic is on lane') },
  'other.mechanic-in': { cell: (p) => `${equipment(p)}: mechanic in machine`, says: otherSays('a mechanic is in the machine') },
  'other.parked': { cell: (p, clock) => `${equipment(p)}: parked till ${clock(count(p, 'untilAt'))}`, says: otherSays('parked') },
  'other.out-of-service': { cell: (p) => `${equipment(p)}: out of service`, says: otherSays('out of service') },
  'other.danger': {
    cell: (p) => safetyNames[text(p, 'safety') as SafetyKind] ?? 'Danger',
    says: (p, _clock, many) => `${be(many)} stopped: ${(safetyNames[text(p, 'safety') as SafetyKind] ?? 'danger').toLowerCase()}`,
  },
  'bumpers.down': fine(() => 'OK'),
  'bumpers.up': { cell: () => 'Bumpers up', says: (_p, _clock, many) => `still ${has(many)} the bumpers up` },
  'certificate.not-needed': fine(() => 'OK'),
  'certificate.valid': fine((p) => `Certified till ${dayOfDate(text(p, 'date'))}`),
  'certificate.none': { cell: () => 'No certificate', says: (_p, _clock, many) => `${has(many)} no certificate, and this is sanctioned play` },
  'certificate.expired': { cell: (p) => `Certificate ended ${dayOfDate(text(p, 'date'))}`, says: (p, _clock, many) => `${be(many)} certified till ${dayOfDate(text(p, 'date'))} only, and this is sanctioned play` },
  'certificate.families-mixed': { cell: () => 'Free-fall and string mixed', says: () => 'mix free-fall with string, which sanctioned play never does' },
};

const WORDS: Record<string, Wording> = { ...PATTERN, ...RUN_AND_LANE, ...MACHINES, ...OTHERS };

export const knowsCheckCode = (code: string): boolean => Object.hasOwn(WORDS, code);

/** What stands in a cell of the table of lanes. */
export const checkCell = ({ code, params }: Pick<SaidCheck, 'code' | 'params'>, clock: Clock): string => WORDS[code]?.cell(params, clock) ?? code;

/** `Lane 31 waits for the mechanic and must be dressed by 20:01.` */
export function checkSentence(lanes: readonly number[], { code, params }: Pick<SaidCheck, 'code' | 'params'>, clock: Clock): string {
  const many = lanes.length > 1;
  const subject = laneSubject(lanes);
  const said = WORDS[code]?.says?.(params, clock, many) ?? checkCell({ code, params }, clock).toLowerCase();
  return `${subject} ${said}.`;
}

/** `Lane 31`, `Lanes 25–32`: in a line of facts. */
export const listedLanes = (lanes: readonly number[]): string => {
  const said = lanesText(lanes);
  return said.charAt(0).toUpperCase() + said.slice(1);
};

/** `Lane 31`, `Lanes 27 and 28`, `Lanes 25–32`. */
export function laneSubject(lanes: readonly number[]): string {
  if (lanes.length === 2) return `Lanes ${listed(lanes.map(String))}`;
  return listedLanes(lanes);
}

/** Who or what a lane waits for, in a word or two. */
export function waitsForText({ waitsFor }: Pick<SaidCheck, 'waitsFor'>): string {
  if (!waitsFor) return '';
  if (waitsFor.kind === 'run') return waitsFor.name === null ? 'A run to be planned' : `Run ${waitsFor.name}`;
  if (waitsFor.kind === 'mechanic') return waitsFor.name ?? 'A mechanic';
  if (waitsFor.kind === 'desk') return 'The desk';
  return waitsFor.name ?? 'People on the lane';
}
