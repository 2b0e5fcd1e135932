import { beforeEach, describe, expect, it } from 'vitest';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { ISOLATION_STEPS, RELEASE_STEPS } from '#shared/domain/calls/lockout-steps.ts';
import type { Answer } from '#tests/support/ask.ts';
import { callsHouse, refusal, seen } from '#tests/support/calls-house.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { served } from '#tests/support/served.ts';

const SECOND = 1000;
const clock = fixedClock('2026-05-14T17:39:00Z');
let call: CallDetail;
let lane = -1;

const { server } = await served({ clock });
const h = await callsHouse(server, { lanes: 40 });
beforeEach(async () => {
  lane += 2;
  clock.advance(60 * SECOND);
  call = await h.stop(lane);
});

/** A second later than whatever came before: facts of one call never share an instant. */
const later = (who: { cookie: string }, path: string, body?: unknown): Promise<Answer> => {
  clock.advance(SECOND);
  return h.post(who, `/${call.id}${path}`, body);
};
const begin = (who = h.mechanic) => later(who, '/lockout');
const step = (code: string, done = true, who = h.mechanic): Promise<Answer> => h.post(who, `/${call.id}/lockout/step`, { step: code, done });
const release = (who = h.mechanic) => later(who, '/lockout/release');
const clear = (who = h.mechanic) => h.post(who, `/${call.id}/clear`, { cause: 'distributor.pin-jam' });
const now = async () => seen(await h.get(h.desk, `/${call.id}`));
async function record(codes: readonly string[]): Promise<void> {
  for (const code of codes) {
    clock.advance(SECOND);
    seen(await step(code));
  }
}
const before = ISOLATION_STEPS.map((one) => one.code);

describe('the lockout record', () => {
  it('goes from reaching in to back running, and only its end lets the lane go', async () => {
    expect(seen(await begin())).toMatchObject({ lockout: { by: h.mechanic.name, byId: h.mechanic.id, steps: {}, inMachineSince: null } });
    await record(before.slice(0, -1));
    expect(await now()).toMatchObject({ mechanicIn: null });
    await record(before.slice(-1));
    expect(await now()).toMatchObject({ mechanicIn: { by: h.mechanic.name, since: clock.now() }, alarmAt: null });
    expect(refusal(await clear())).toMatchObject({ status: 409, code: 'call.mechanic-in-machine', params: { by: h.mechanic.name } });
    await record(RELEASE_STEPS.slice(0, -1));
    expect(refusal(await release())).toMatchObject({ status: 409, code: 'lockout.release-incomplete', params: { waitsFor: 'own-lock-off' } });
    expect(refusal(await clear())).toMatchObject({ code: 'call.mechanic-in-machine' });
    await record(RELEASE_STEPS.slice(-1));
    expect(refusal(await clear())).toMatchObject({ code: 'call.mechanic-in-machine' });
    expect(seen(await release())).toMatchObject({ mechanicIn: null, lockout: { releasedAt: clock.now() } });
    expect(seen(await clear())).toMatchObject({ status: 'closed', cleared: { cause: 'distributor.pin-jam' } });
  });

  it('keeps the order of its steps, and lets a slip be taken back', async () => {
    expect(refusal(await step('told-desk'))).toMatchObject({ status: 409, code: 'lockout.not-begun' });
    await begin();
    expect(refusal(await begin())).toMatchObject({ status: 409, code: 'lockout.already-begun' });
    expect(refusal(await step('lock-and-tag'))).toMatchObject({ status: 409, code: 'lockout.step-out-of-order', params: { waitsFor: 'told-desk' } });
    expect(await step('kick-it')).toMatchObject({ status: 422, body: { code: 'lockout.step-unknown', errors: [{ pointer: '/step' }] } });
    await record(['told-desk', 'machine-stopped']);
    expect(refusal(await step('told-desk', false))).toMatchObject({ code: 'lockout.step-out-of-order', params: { waitsFor: 'machine-stopped' } });
    expect(Object.keys(seen(await step('machine-stopped', false)).lockout?.steps ?? {})).toEqual(['told-desk']);
  });

  it('is one person’s: nobody else fills it in, parks the call or takes it over', async () => {
    await h.post(h.mechanic, `/${call.id}/acknowledge`);
    await begin();
    await record(['told-desk']);
    expect(refusal(await step('machine-stopped', true, h.other))).toMatchObject({ status: 409, code: 'lockout.other-mechanic', params: { by: h.mechanic.name } });
    expect(refusal(await release(h.other))).toMatchObject({ status: 409, code: 'lockout.other-mechanic' });
    expect(refusal(await h.post(h.other, `/${call.id}/take-over`))).toMatchObject({ code: 'call.mechanic-in-machine' });
    expect(refusal(await h.post(h.other, `/${call.id}/park`, { reason: 'x', until: clock.now() + 60 * SECOND }))).toMatchObject({ code: 'call.mechanic-in-machine' });
    expect((await h.post(h.desk, `/${call.id}/lockout`)).status).toBe(403);
  });

  it('is dropped without release steps while nothing was recorded', async () => {
    await begin();
    expect(seen(await release()).lockout?.releasedAt).toBe(clock.now());
    expect(seen(await clear()).status).toBe('closed');
  });

  it('stays on a machine that goes out of service, and keeps it there', async () => {
    await begin();
    await record(before);
    expect(seen(await h.post(h.mechanic, `/${call.id}/out-of-service`, { reason: 'Part missing' }))).toMatchObject({ status: 'out-of-service', mechanicIn: { by: h.mechanic.name } });
    expect(refusal(await h.post(h.mechanic, `/${call.id}/back-in-service`, {}))).toMatchObject({ code: 'call.mechanic-in-machine' });
    await record(RELEASE_STEPS);
    seen(await release());
    expect(seen(await h.post(h.mechanic, `/${call.id}/back-in-service`, {})).status).toBe('closed');
  });

  it('of a lock left behind is ended by the manager alone, who says how', async () => {
    await begin();
    await record(before);
    expect((await h.post(h.other, `/${call.id}/lockout/left-behind`, { procedure: 'x' })).status).toBe(403);
    const ended = seen(await later(h.manager, '/lockout/left-behind', { procedure: 'Owner reached by phone, machine checked by two' }));
    expect(ended).toMatchObject({ mechanicIn: null, lockout: { releasedAt: clock.now() } });
    expect(ended.steps.at(-1)).toMatchObject({ kind: 'lockout-released', by: h.manager.name, text: 'Owner reached by phone, machine checked by two' });
    expect(refusal(await h.post(h.manager, `/${call.id}/lockout/left-behind`, { procedure: 'again' }))).toMatchObject({ code: 'lockout.not-begun' });
  });
});

describe('the alarm', () => {
  it.each([
    ['counts cycles', () => h.device('lane.counted', { lane, cycles: 1 })],
    ['counts deliveries', () => h.device('lane.counted', { lane, deliveries: 2 })],
    ['is switched on', () => h.device('pinsetter.on', { lane })],
    ['is opened', () => h.device('lane.opened', { lane, use: 'open' })],
  ])('sounds when the lane %s with somebody recorded in the machine', async (_what, move) => {
    await begin();
    await record(before);
    clock.advance(SECOND);
    await move();
    const alarmed = await now();
    expect(alarmed).toMatchObject({ alarmAt: clock.now(), mechanicIn: { by: h.mechanic.name } });
    expect(alarmed.steps.at(-1)?.kind).toBe('lockout-alarm');
  });

  it('stays silent for the neighbour, before the record is complete, and after its end', async () => {
    await begin();
    await record(before.slice(0, -1));
    await h.device('lane.counted', { lane, cycles: 1 });
    expect((await now()).alarmAt).toBeNull();
    await record(before.slice(-1));
    clock.advance(SECOND);
    await h.device('lane.counted', { lane: lane + 1, cycles: 3 });
    await h.device('lane.counted', { lane, cycles: 0 });
    expect((await now()).alarmAt).toBeNull();
    await record(RELEASE_STEPS);
    seen(await release());
    clock.advance(SECOND);
    await h.device('lane.counted', { lane, cycles: 1 });
    expect((await now()).alarmAt).toBeNull();
  });
});
