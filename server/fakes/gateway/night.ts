import { weekdayOf } from '../../../src/shared/domain/business-day.ts';
import { type Anchor, careEvents, careOf, careTakes } from './care.ts';
import type { DeviceEvent } from './events.ts';
import { leaguesOn } from './invented-house.ts';
import { type Grain, playEvents } from './play.ts';
import { type Block, lanesOf, leagueBlocks, MINUTE, type NightKey, openBlocks, wallInstant } from './timetable.ts';
import { troubleEvents } from './trouble.ts';

export type { Anchor } from './care.ts';
export type { NightKey } from './timetable.ts';

/** While a newcomer looks on: one lane of open play stops within the first minute, one of a league a little later. */
const FIRST_STOP = { lane: 14, after: 50_000, lasts: 7 * MINUTE };
const SECOND_STOP = { lane: 9, after: 5 * MINUTE, lasts: 6 * MINUTE };

/** Everything the invented house tells of one business day, in the order of time. The same key gives the same night. */
export function nightEvents(night: NightKey, grain: Grain, anchor: Anchor | null): DeviceEvent[] {
  const care = careOf(night, anchor);
  const shown = anchor ? shownBlocks(anchor) : [];
  const leagues = leagueBlocks(night);
  const open = openBlocks(night, [...leagues, ...careTakes(care), ...shown, ...(anchor ? keptFresh(night, anchor) : [])]);
  const play = [...leagues, ...shown, ...open].flatMap((block) => playEvents(night, block, grain, anchor ? stopsShown(block, anchor) : []));
  const events = [...play, ...care.flatMap((run) => careEvents(night, run)), ...troubleEvents(night, anchor !== null)];
  return events.sort((a, b) => a.time - b.time || (a.id < b.id ? -1 : 1));
}

/** The anchored run dresses long before its league: nobody is let onto those lanes meanwhile. */
function keptFresh(night: NightKey, anchor: Anchor): { lane: number; from: number; to: number }[] {
  const owls = leaguesOn(weekdayOf(night.date)).find((league) => league.slot === 'owls');
  return owls ? lanesOf(owls).map((lane) => ({ lane, from: anchor.at - 3 * MINUTE, to: wallInstant(night, owls.start) })) : [];
}

/** People who bowl as the newcomer looks on: since so many minutes, for so many more. */
const SHOWN = [
  { lane: 13, since: 18, more: 41, bowlers: 3, party: null }, { lane: 14, since: 26, more: 52, bowlers: 4, party: null }, { lane: 15, since: 44, more: 22, bowlers: 2, party: null },
  { lane: 16, since: 31, more: 37, bowlers: 4, party: null }, { lane: 17, since: 12, more: 58, bowlers: 6, party: 'Ada is nine' }, { lane: 18, since: 12, more: 58, bowlers: 6, party: 'Ada is nine' },
];

const shownBlocks = (anchor: Anchor): Block[] => SHOWN.map(({ lane, since, more, bowlers, party }) => ({
  lane, place: 'shown', kind: party ? 'party' : 'open', label: party, from: anchor.at - since * MINUTE, to: anchor.at + more * MINUTE, frames: null, bowlers, warmUpMs: 0,
}));

function stopsShown(block: Block, anchor: Anchor): { from: number; to: number }[] {
  const inside = (at: number) => block.from + block.warmUpMs < at && at < block.to;
  return [FIRST_STOP, SECOND_STOP]
    .filter((stop) => stop.lane === block.lane)
    .map((stop) => Math.max(anchor.at + stop.after, block.frames === null ? 0 : block.from + block.warmUpMs + 7 * MINUTE))
    .filter(inside)
    .map((from) => ({ from, to: from + (block.lane === FIRST_STOP.lane ? FIRST_STOP.lasts : SECOND_STOP.lasts) }));
}
