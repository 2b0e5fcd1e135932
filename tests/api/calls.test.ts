import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { callsHouse, refusal, seen } from '#tests/support/calls-house.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { served } from '#tests/support/served.ts';

const MINUTE = 60_000;
const clock = fixedClock('2026-05-14T17:39:00Z');

const { server, database } = await served({ clock });
let h = await callsHouse(server, { lanes: 80 });
beforeEach(() => {
  clock.advance(MINUTE);
});

/** A pair that no test has used: its odd lane. */
let used = -1;
const freshPair = (): number => (used += 2);

const factsOf = async (type: string, call: { id: string }): Promise<number> => {
  const [row] = await database.db('journal').where({ centre_id: h.centre.id, type }).whereRaw("json_value(data, '$.call') = ?", [call.id]).count({ n: '*' });
  return Number(row?.['n']);
};

describe('the life of a call', () => {
  it('goes from a stop to back running, every step with who and when', async () => {
    const call = await h.stop(freshPair());
    expect(call).toMatchObject({ lane: used, equipment: 'pinsetter', origin: 'stop', status: 'unanswered', raisedAt: clock.now(), family: 'free-fall', mechanic: null });
    clock.advance(MINUTE);
    expect(seen(await h.post(h.mechanic, `/${call.id}/acknowledge`))).toMatchObject({ status: 'acknowledged', mechanic: { id: h.mechanic.id, name: h.mechanic.name }, acknowledgedAt: clock.now() });
    clock.advance(MINUTE);
    expect(seen(await h.post(h.mechanic, `/${call.id}/on-lane`))).toMatchObject({ status: 'on-lane', onLaneAt: clock.now() });
    clock.advance(MINUTE);
    const closed = seen(await h.post(h.mechanic, `/${call.id}/clear`, { cause: 'deck.pin-off-spot', note: 'respotted' }));
    expect(closed).toMatchObject({ status: 'closed', cleared: { at: clock.now(), by: h.mechanic.name, cause: 'deck.pin-off-spot', note: 'respotted' } });
    expect(closed.steps.map((step) => [step.kind, step.by])).toEqual([
      ['raised', expect.stringMatching(/^Gateway \d+$/)], ['acknowledged', h.mechanic.name], ['on-lane', h.mechanic.name], ['cleared', h.mechanic.name],
    ]);
    const list = (await h.get(h.desk)).body as { open: unknown[]; closed: object[]; lanes: number };
    expect(list).toMatchObject({ open: [], lanes: 80, closed: [{ id: call.id, cause: 'deck.pin-off-spot', closedBy: h.mechanic.name, downMs: 3 * MINUTE }] });
  });

  it('can go out of service and back, and then is closed', async () => {
    const call = await h.stop(freshPair());
    expect(refusal(await h.post(h.mechanic, `/${call.id}/back-in-service`, {}))).toMatchObject({ status: 409, code: 'call.not-out-of-service' });
    expect(seen(await h.post(h.mechanic, `/${call.id}/out-of-service`, { reason: 'Part missing' }))).toMatchObject({ status: 'out-of-service', outOfService: { reason: 'Part missing', by: h.mechanic.name } });
    for (const path of ['out-of-service', 'clear', 'acknowledge', 'on-lane', 'park'] as const) {
      const body = { 'clear': { cause: 'deck.pin-off-spot' }, 'out-of-service': { reason: 'x' }, 'park': { reason: 'x', until: clock.now() + MINUTE }, 'acknowledge': undefined, 'on-lane': undefined }[path];
      expect(refusal(await h.post(h.mechanic, `/${call.id}/${path}`, body)), path).toMatchObject({ status: 409, code: 'call.out-of-service' });
    }
    expect(seen(await h.post(h.other, `/${call.id}/back-in-service`, { cause: 'drive.belt' }))).toMatchObject({ status: 'closed', cleared: { cause: 'drive.belt', by: h.other.name } });
  });

  it('is parked with an end, asks again after it, and is taken up again', async () => {
    const call = await h.stop(freshPair());
    const until = clock.now() + 15 * MINUTE;
    expect(refusal(await h.post(h.mechanic, `/${call.id}/park`, { reason: 'After this game', until: clock.now() }))).toMatchObject({ status: 422, code: 'call.park-end-invalid' });
    expect(refusal(await h.post(h.mechanic, `/${call.id}/unpark`))).toMatchObject({ status: 409, code: 'call.not-parked' });
    expect(seen(await h.post(h.mechanic, `/${call.id}/park`, { reason: 'After this game', until }))).toMatchObject({ status: 'parked', parkedUntil: until, escalation: 'none' });
    clock.advance(19 * MINUTE);
    expect(seen(await h.get(h.desk, `/${call.id}`))).toMatchObject({ status: 'unanswered', parkedUntil: null, escalation: 'other-mechanic' });
    expect(seen(await h.post(h.mechanic, `/${call.id}/unpark`))).toMatchObject({ status: 'unanswered' });
  });

  it('is taken over in so many words, never by accident', async () => {
    const call = await h.stop(freshPair());
    expect(refusal(await h.post(h.other, `/${call.id}/take-over`))).toMatchObject({ status: 409, code: 'call.not-acknowledged' });
    await h.post(h.mechanic, `/${call.id}/acknowledge`);
    expect(refusal(await h.post(h.other, `/${call.id}/acknowledge`))).toMatchObject({ status: 409, code: 'call.already-acknowledged', params: { by: h.mechanic.name } });
    expect(refusal(await h.post(h.mechanic, `/${call.id}/take-over`))).toMatchObject({ status: 409, code: 'call.already-yours' });
    expect(seen(await h.post(h.other, `/${call.id}/take-over`))).toMatchObject({ status: 'acknowledged', mechanic: { id: h.other.id } });
  });

  it('says who should look by now', async () => {
    const call = await h.stop(freshPair());
    const at = async (minutes: number) => {
      clock.advance(call.receivedAt + minutes * MINUTE - clock.now());
      return seen(await h.get(h.desk, `/${call.id}`)).escalation;
    };
    expect([await at(2), await at(3), await at(6), await at(9)]).toEqual(['none', 'other-mechanic', 'desk', 'manager']);
  });
});

describe('fifty who say "mine" at once', () => {
  it('one is heard, the others are told by whom, and the journal has one fact', async () => {
    const call = await h.stop(freshPair());
    const who = [h.mechanic, h.other, h.manager];
    const answers = await Promise.all(Array.from({ length: 50 }, (_, i) => h.post(who[i % who.length]!, `/${call.id}/acknowledge`)));
    const won = answers.filter((one) => one.status === 200);
    expect(won).toHaveLength(1);
    const winner = seen(won[0]!).mechanic;
    const lost = answers.filter((one) => one.status === 409).map(refusal);
    expect(lost).toHaveLength(49);
    for (const one of lost) expect(one).toMatchObject({ code: 'call.already-acknowledged', params: { by: winner?.name, byId: winner?.id } });
    expect(await factsOf('call.acknowledged', call)).toBe(1);
    expect(seen(await h.get(h.desk, `/${call.id}`)).mechanic).toEqual(winner);
  });

  it('a repeat with the same key has the effect of once', async () => {
    const call = await h.stop(freshPair());
    const key = { 'idempotency-key': 'a1b2c3d4e5f60718' };
    const first = await h.post(h.mechanic, `/${call.id}/acknowledge`, undefined, key);
    const again = await h.post(h.mechanic, `/${call.id}/acknowledge`, undefined, key);
    expect([first.status, again.status]).toEqual([200, 200]);
    expect(again.body).toEqual(first.body);
    expect(await factsOf('call.acknowledged', call)).toBe(1);
  });
});

describe('one open call for a place and its equipment', () => {
  it('takes later stops of the lane, and a raise of it, into the open call', async () => {
    const call = await h.stop(freshPair());
    clock.advance(MINUTE);
    await h.device('pinsetter.stopped', { lane: call.lane, code: 'E4' });
    const raised = await h.post(h.desk, '', { lane: call.lane, text: 'rake hangs' });
    expect(raised.status).toBe(201);
    expect(seen(raised)).toMatchObject({ id: call.id, joined: 2, code: 'E4', text: 'rake hangs' });
  });

  it('counts what a pair shares once, whichever lane names it', async () => {
    const lane = freshPair();
    const first = seen(await h.post(h.desk, '', { lane, equipment: 'ball-lift' }));
    const second = seen(await h.post(h.desk, '', { lane: lane + 1, equipment: 'ball-lift' }));
    expect(first).toMatchObject({ scope: 'pair', lanesHeld: [lane, lane + 1], neighbour: { lane: lane + 1 } });
    expect(second.id).toBe(first.id);
    expect(await h.openOn(lane)).toHaveLength(1);
  });

  it('keeps other equipment of the same lane apart', async () => {
    const lane = freshPair();
    await h.post(h.desk, '', { lane, equipment: 'foul-unit' });
    await h.post(h.desk, '', { lane, equipment: 'scoring' });
    expect(await h.openOn(lane)).toHaveLength(2);
  });

  it('is a new call after the last one was closed', async () => {
    const call = await h.stop(freshPair());
    await h.post(h.mechanic, `/${call.id}/clear`, { cause: 'deck.pin-off-spot' });
    clock.advance(MINUTE);
    expect((await h.stop(call.lane)).id).not.toBe(call.id);
  });
});

describe('a danger', () => {
  it('stops both lanes, is the desk’s at once, and cannot be parked', async () => {
    const lane = freshPair();
    const call = seen(await h.post(h.desk, '', { lane: lane + 1, safety: 'wet-approach' }));
    expect(call).toMatchObject({ safety: 'wet-approach', scope: 'pair', lanesHeld: [lane, lane + 1], equipment: 'approach', escalation: 'desk' });
    expect(refusal(await h.post(h.mechanic, `/${call.id}/park`, { reason: 'later', until: clock.now() + MINUTE }))).toMatchObject({ status: 409, code: 'call.safety-cannot-be-parked' });
    expect(seen(await h.post(h.desk, `/${call.id}/acknowledge`))).toMatchObject({ mechanic: { id: h.desk.id } });
    expect(seen(await h.post(h.desk, `/${call.id}/clear`, { cause: 'danger.approach-dried' }))).toMatchObject({ status: 'closed' });
  });

  it('is all that the desk answers', async () => {
    const call = await h.stop(freshPair());
    for (const [path, body] of [['acknowledge', undefined], ['on-lane', undefined], ['clear', { cause: 'other.adjusted' }]] as const) {
      expect(refusal(await h.post(h.desk, `/${call.id}/${path}`, body))).toMatchObject({ status: 403, code: 'call.desk-answers-dangers' });
    }
    expect((await h.post(h.desk, `/${call.id}/take-over`)).status).toBe(403);
  });

  it('holds its lanes even when power is named beside it', async () => {
    const lane = freshPair();
    expect(seen(await h.post(h.desk, '', { lane, equipment: 'power', safety: 'smoke' }))).toMatchObject({ lanesHeld: [lane, lane + 1], scope: 'pair' });
  });
});

describe('what is refused', () => {
  it('a clear of a cleared call, and every other step on it', async () => {
    const call = await h.stop(freshPair());
    await h.post(h.mechanic, `/${call.id}/clear`, { cause: 'deck.pin-off-spot' });
    for (const [path, body] of [
      ['clear', { cause: 'deck.pin-off-spot' }], ['acknowledge', undefined], ['on-lane', undefined], ['park', { reason: 'x', until: clock.now() + MINUTE }],
      ['out-of-service', { reason: 'x' }], ['back-in-service', {}], ['lockout', undefined], ['lockout/step', { step: 'told-desk', done: true }], ['lockout/release', undefined], ['take-over', undefined], ['unpark', undefined],
    ] as const) expect(refusal(await h.post(h.mechanic, `/${call.id}/${path}`, body)), path).toMatchObject({ status: 409, code: 'call.already-cleared' });
    expect(await factsOf('call.cleared', call)).toBe(1);
  });

  it('a call that isn’t there, or is another house’s', async () => {
    const call = await h.stop(freshPair());
    expect(refusal(await h.post(h.mechanic, '/018f0000-0000-7000-8000-000000000000/acknowledge'))).toMatchObject({ status: 404, code: 'call.unknown' });
    const elsewhere = await callsHouse(server);
    expect(refusal(await elsewhere.post(elsewhere.mechanic, `/${call.id}/acknowledge`))).toMatchObject({ status: 404, code: 'call.unknown' });
    expect((await elsewhere.get(elsewhere.desk, `/${call.id}`)).status).toBe(404);
  });

  it('a lane that the house doesn’t have, beside its field', async () => {
    const answer = await h.post(h.desk, '', { lane: 81 });
    expect(answer).toMatchObject({ status: 422, body: { code: 'lane.unknown', errors: [{ pointer: '/lane' }] } });
  });

  it('a cause that doesn’t exist or isn’t of this machine', async () => {
    const call = await h.stop(freshPair());
    for (const cause of ['gremlins', 'string.tangle']) {
      expect(await h.post(h.mechanic, `/${call.id}/clear`, { cause })).toMatchObject({ status: 422, body: { code: 'call.cause-unknown', errors: [{ pointer: '/cause' }] } });
    }
    expect(seen(await h.get(h.desk, `/${call.id}`)).status).toBe('unanswered');
  });
});

describe('history of a lane', () => {
  const repair = async (lane: number, cause: string, note?: string): Promise<CallDetail> => {
    const call = await h.stop(lane);
    clock.advance(2 * MINUTE);
    return seen(await h.post(h.mechanic, `/${call.id}/clear`, { cause, note }));
  };

  let others: typeof h;
  beforeAll(async () => {
    others = h;
    h = await callsHouse(server);
  });
  afterAll(() => {
    h = others;
  });

  it('shows what it was last time, how often it stopped in 200 frames, and what is most frequent here', async () => {
    await h.device('lane.counted', { lane: 9, frames: 100 });
    await repair(9, 'deck.pin-off-spot', 'spot cup worn');
    clock.advance(MINUTE);
    await h.device('lane.counted', { lane: 9, frames: 150 });
    await repair(9, 'distributor.pin-jam');
    await repair(5, 'distributor.pin-jam');
    clock.advance(MINUTE);
    const call = await h.stop(9);
    expect(call.history.stopsIn200Frames).toBe(3);
    expect(call.history.last.map((past) => past.cause)).toEqual(['distributor.pin-jam', 'deck.pin-off-spot']);
    expect(call.history.last[1]).toMatchObject({ note: 'spot cup worn', by: h.mechanic.name, downMs: 2 * MINUTE, equipment: 'pinsetter' });
    expect(call.causeTimes).toEqual({ 'distributor.pin-jam': 2, 'deck.pin-off-spot': 1 });
  });

  it('forgets stops that are more than 200 frames ago, and knows nothing where no frames are heard', async () => {
    await h.device('lane.counted', { lane: 7, frames: 10 });
    await repair(7, 'deck.pin-off-spot');
    clock.advance(MINUTE);
    await h.device('lane.counted', { lane: 7, frames: 200 });
    expect((await h.stop(7)).history.stopsIn200Frames).toBe(1);
    expect((await h.stop(1)).history.stopsIn200Frames).toBeNull();
  });

  it('counts what the pair shares in the history of both lanes', async () => {
    const lift = seen(await h.post(h.desk, '', { lane: 11, equipment: 'ball-lift' }));
    clock.advance(MINUTE);
    await h.post(h.mechanic, `/${lift.id}/clear`, { cause: 'lift.belt-slips' });
    clock.advance(MINUTE);
    expect((await h.stop(12)).history.last).toMatchObject([{ cause: 'lift.belt-slips', equipment: 'ball-lift' }]);
    expect((await h.stop(3)).history.last).toEqual([]);
  });
});
