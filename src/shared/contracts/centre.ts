import * as z from 'zod/mini';
import { isZone } from '../domain/business-day.ts';
import { centreParams, contract, date, instant, laneNumber, laneParam, line, ok, uuid } from './contract.ts';

export const LANE_FAMILIES = ['free-fall', 'string'] as const;
/** Whether stops of a lane are heard from its machine, logged by people, or not known: the base of rates. */
export const STOP_COVERAGES = ['heard', 'logged', 'none'] as const;

const minute = z.int().check(z.minimum(0), z.maximum(1440));
/** From and to in minutes after local midnight; `to` at or below `from` is on the next day. Null: closed. */
export const openingOfDay = z.nullable(z.object({ from: minute, to: minute }));
/** Seven days, Monday first. */
export const openingHours = z.array(openingOfDay).check(z.minLength(7), z.maxLength(7));
export type OpeningHours = z.infer<typeof openingHours>;

export const centreSettings = z.object({
  name: line(80),
  zone: z.string().check(z.maxLength(64), z.refine(isZone)),
  /** Minutes after local midnight at which a business day begins; by quarter hours, as counts are kept by them. */
  cut: z.int().check(z.minimum(0), z.maximum(720), z.multipleOf(15)),
  opening: openingHours,
});
export type CentreSettings = z.infer<typeof centreSettings>;

export const laneSettings = z.object({
  lane: laneNumber, family: z.enum(LANE_FAMILIES), certifiedUntil: z.nullable(date), stopCoverage: z.enum(STOP_COVERAGES),
});
export type LaneSettings = z.infer<typeof laneSettings>;

export const gatewaySettings = z.object({
  id: uuid, name: z.string(), createdAt: instant, heardAt: z.nullable(instant), silent: z.boolean(), clockErrorMs: z.nullable(z.int()),
  queued: z.nullable(z.int()), missing: z.nullable(z.string()), faults: z.array(z.string()),
  /** Keys that live; a key itself is shown once, when it is made. */
  keys: z.array(z.object({ id: uuid, createdAt: instant })),
});
export type GatewaySettings = z.infer<typeof gatewaySettings>;

const upTo = (low: number, high: number) => z.int().check(z.minimum(low), z.maximum(high));
export const houseRules = z.object({
  otherMechanicMin: upTo(1, 60), deskMin: upTo(1, 120), managerMin: upTo(1, 240), dressMarginMin: upTo(0, 120), planLeadMin: upTo(10, 720), lowBatteryPct: upTo(0, 90),
  freshDeliveries: upTo(0, 2_000), freshHours: upTo(1, 72), wornDeliveries: upTo(1, 5_000), wornHours: upTo(1, 240), freshTolerance: upTo(0, 100),
});

const at = '/api/centres/:centre/settings';
const newKey = z.object({ gateway: gatewaySettings, key: z.string() });
const gatewayParams = z.extend(centreParams, { gateway: uuid });

export const centreContracts = {
  settings: contract({
    id: 'centre.settings', method: 'GET', path: at, permission: 'settings.see', summary: 'The centre, its lanes and gateways as they are set', params: centreParams,
    response: z.object({ centre: z.extend(centreSettings, { slug: z.string(), lanes: z.int() }), lanes: z.array(laneSettings), gateways: z.array(gatewaySettings), rules: houseRules }),
  }),
  save: contract({
    id: 'centre.save', method: 'PUT', path: at, permission: 'settings.edit', summary: 'Change name, zone, business-day cut and opening hours', params: centreParams,
    body: centreSettings, response: ok,
  }),
  saveRules: contract({
    id: 'centre.saveRules', method: 'PUT', path: `${at}/rules`, permission: 'settings.edit', summary: 'When others are asked, when lanes are to be dressed, what counts as fresh and worn',
    params: centreParams, body: houseRules, response: houseRules, refusals: ['rules.contradict'],
  }),
  lane: contract({
    id: 'centre.lane', method: 'PATCH', path: `${at}/lanes/:lane`, permission: 'settings.edit', summary: 'Change what is known of one lane',
    params: z.extend(centreParams, { lane: laneParam }),
    body: z.object({ family: z.optional(z.enum(LANE_FAMILIES)), certifiedUntil: z.optional(z.nullable(date)), stopCoverage: z.optional(z.enum(STOP_COVERAGES)) }),
    response: laneSettings, refusals: ['lane.unknown', 'date.invalid'],
  }),
  addGateway: contract({
    id: 'centre.addGateway', method: 'POST', path: `${at}/gateways`, permission: 'settings.edit', summary: 'Make a gateway; its key is shown in this answer only', params: centreParams,
    status: 201, body: z.object({ name: line(80) }), response: newKey, refusals: ['gateway.name-taken'],
  }),
  addKey: contract({
    id: 'centre.addGatewayKey', method: 'POST', path: `${at}/gateways/:gateway/keys`, permission: 'settings.edit', status: 201,
    summary: 'Make a second key, to change over to; shown in this answer only', params: gatewayParams, response: newKey, refusals: ['gateway.unknown', 'gateway.two-keys'],
  }),
  revokeKey: contract({
    id: 'centre.revokeGatewayKey', method: 'DELETE', path: `${at}/gateways/:gateway/keys/:key`, permission: 'settings.edit', summary: 'Revoke a key, at once',
    params: z.extend(gatewayParams, { key: uuid }), response: ok, refusals: ['gateway.key-unknown'],
  }),
};
