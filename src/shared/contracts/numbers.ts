import * as z from 'zod/mini';
import { LANE_USES } from '../domain/equipment.ts';
import { centreParams, contract, date, instant, laneNumber } from './contract.ts';

const COUNT_KINDS = [...LANE_USES, 'unassigned'] as const;
const ms = z.number();
const rate = z.nullable(z.object({ perThousand: z.number(), low: z.number(), high: z.number() }));
const counts = {
  deliveries: z.int(), frames: z.int(), framesEstimated: z.int(), games: z.int(), lineage: z.number(), stops: z.int(), calls: z.int(), bowlerCalls: z.int(),
  foreignCalls: z.int(), rate, grossRate: rate, framesPerStop: z.nullable(z.object({ value: z.nullable(z.number()), low: z.number(), high: z.nullable(z.number()) })),
};
const use = z.object({ league: ms, paid: ms, unpaid: ms, blocked: ms, idle: ms, outOfService: ms, open: ms });
const spread = z.object({ median: z.nullable(ms), p90: z.nullable(ms), n: z.int() });
const share = z.nullable(z.number());

export const nightFiguresView = z.object({
  total: z.object({ ...counts, use, occupancyOfAll: share, occupancyInService: share, downMs: ms, wantedDownMs: ms }),
  byKind: z.array(z.object({ ...counts, kind: z.enum(COUNT_KINDS), playedMs: ms })),
  byLane: z.array(z.object({ ...counts, lane: laneNumber, use, occupancy: share, downMs: ms, wantedDownMs: ms })),
  leagueLostMs: ms, acknowledged: spread, onLane: spread, restored: spread,
  ready: z.object({ ready: z.int(), of: z.int() }), dressed: z.object({ lanes: z.int(), ul: z.int(), told: z.int() }),
});
export type NightFiguresView = z.infer<typeof nightFiguresView>;

/** One figure over the same weekday's last issued reports. */
const past = z.object({ median: z.nullable(z.number()), low: z.nullable(z.number()), high: z.nullable(z.number()), n: z.int() });
export const PAST_FIGURES = ['occupancy', 'frames', 'rate', 'onLaneMs', 'leagueLostMs', 'readyShare', 'ulPerLane', 'downMs'] as const;
export type PastFigure = (typeof PAST_FIGURES)[number];

export const nightView = z.object({
  date, from: instant, to: instant, at: instant, running: z.boolean(),
  /** As it stands now. */
  figures: nightFiguresView,
  /** As issued after the cut and kept unchanged; null: not yet. */
  report: z.nullable(z.object({ issuedAt: instant, figures: nightFiguresView })),
  /** Figures that came out otherwise since the report was issued: of the house (no `lane`, no `kind`), of a lane, of a kind of play. */
  differs: z.array(z.object({ figure: z.string(), lane: z.nullable(laneNumber), kind: z.nullable(z.enum(COUNT_KINDS)), issued: z.nullable(z.number()), now: z.nullable(z.number()) })),
  past: z.record(z.enum(PAST_FIGURES), past),
  /** Nights that have a report, newest first, at most 60. */
  nights: z.array(date),
});
export type NightView = z.infer<typeof nightView>;

/** Each lane over the last eight weeks against what its own frames allow (prediction limits of a Poisson count). */
export const funnelView = z.object({
  from: date, to: date, nights: z.int(), overall: rate, frames: z.int(),
  lanes: z.array(z.object({ lane: laneNumber, frames: z.int(), stops: z.int(), perThousand: z.nullable(z.number()), position: z.enum(['inside', 'above-inner', 'above-outer', 'below-inner', 'below-outer', 'no-frames']) })),
  /** Limits to draw, by frames: 95 % and 99.8 %. */
  limits: z.array(z.object({ frames: z.int(), low95: z.number(), high95: z.number(), low998: z.number(), high998: z.number() })),
  /** How many of these lanes leave the 95 % band by chance alone. */
  byChance: z.number(),
  finding: z.string(),
});
export type FunnelView = z.infer<typeof funnelView>;

export const numbersContracts = {
  night: contract({
    id: 'numbers.night', method: 'GET', path: '/api/centres/:centre/nights/:date', permission: 'figures.see', summary: 'The figures of one business day, live and as issued',
    params: z.extend(centreParams, { date }), response: nightView, refusals: ['night.date-invalid', 'night.not-begun'],
  }),
  lanes: contract({
    id: 'numbers.lanes', method: 'GET', path: '/api/centres/:centre/lanes-compared', permission: 'figures.see', summary: 'Which lane is really worse: eight weeks, funnel limits',
    params: centreParams, response: funnelView,
  }),
};
