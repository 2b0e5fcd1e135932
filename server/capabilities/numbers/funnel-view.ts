import type { FunnelView } from '#shared/contracts/numbers.ts';
import { addDays, businessDay, businessDayAt } from '#shared/domain/business-day.ts';
import { dispersion } from '#shared/domain/numbers/dispersion.ts';
import { laneFinding } from '#shared/domain/numbers/findings.ts';
import { funnel, funnelCount } from '#shared/domain/numbers/funnel.ts';
import { rateOf } from '#shared/domain/numbers/night/figures.ts';
import { counting } from '#shared/domain/numbers/night/stops.ts';
import { laneWords } from '#shared/text/en/numbers-words.ts';
import type { Database } from '#server/platform/db/database.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { laneWeeks } from './read-model.ts';

const NIGHTS = 56;
const CURVE_POINTS = 60;

/** Machine stops of each lane over the last eight weeks against its own frames. Calls are counted on lanes whose frames are heard. */
export async function funnelOf(db: Database, centre: CentreRef, now: number): Promise<FunnelView> {
  const today = businessDayAt(now, centre.zone, centre.cut);
  const from = businessDay(addDays(today.date, -NIGHTS), centre.zone, centre.cut);
  const { frames, calls } = await laneWeeks(db, centre, { from: from.from, to: today.from });
  const stops = (lane: number): number => calls.filter((c) => c.lane === lane && counting(c) === 'machine-stop').length;
  const lanes = Array.from({ length: centre.lanes }, (_, i) => ({ lane: i + 1, frames: frames.get(i + 1) ?? 0, count: stops(i + 1) }));
  const heard = lanes.filter((l) => l.frames > 0);
  const result = funnel(lanes);
  const total = heard.reduce((sum, l) => ({ frames: sum.frames + l.frames, count: sum.count + l.count }), { frames: 0, count: 0 });
  const shown = 'lanes' in result ? result : null;
  return {
    from: from.date, to: addDays(today.date, -1), nights: NIGHTS, overall: rateOf(total.count, total.frames), frames: total.frames,
    lanes: lanes.map((l) => ({
      lane: l.lane, frames: l.frames, stops: l.count, perThousand: l.frames > 0 ? (1000 * l.count) / l.frames : null,
      position: shown?.lanes.find((s) => s.lane === l.lane)?.position ?? (l.frames > 0 ? 'inside' : 'no-frames'),
    })),
    limits: shown ? curve(shown.target, heard.map((l) => l.frames)) : [],
    byChance: shown ? shown.byChance.inner.above + shown.byChance.inner.below : 0,
    finding: laneWords(laneFinding(result, dispersion(heard.map((l) => l.count), heard.map((l) => l.frames)))),
  };
}

/** Limits to draw over the range of frames that the lanes have. */
function curve(target: number, frames: readonly number[]): FunnelView['limits'] {
  const low = Math.min(...frames) * 0.9;
  const high = Math.max(...frames) * 1.05;
  return Array.from({ length: CURVE_POINTS }, (_, i) => {
    const at = Math.max(1, Math.round(low + ((high - low) * i) / (CURVE_POINTS - 1)));
    const limit = (p: number): number => (1000 * funnelCount((target * at) / 1000, p)) / at;
    return { frames: at, low95: limit(0.025), high95: limit(0.975), low998: limit(0.001), high998: limit(0.999) };
  });
}
