import { describe, expect, it } from 'vitest';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { Problem } from '../../lib/api.ts';
import { ActionQueue, type QueuedAction } from './action-queue.ts';

const action = (key: string, over: Partial<QueuedAction> = {}): QueuedAction => ({ key, user: 'u1', centre: 'c', call: 'call-9', kind: 'acknowledge', body: null, madeAt: 0, ...over });

/** A server that answers as told, a clock that is turned by hand, and the phone's storage. */
function phone(kept: QueuedAction[] = []) {
  const world = { sent: [] as string[], stored: [...kept], done: [] as string[], timers: [] as (() => void)[], answer: (_action: QueuedAction): Problem | null => null };
  const queue = new ActionQueue({
    load: () => world.stored,
    save: (waiting) => void (world.stored = [...waiting]),
    after: (_ms, run) => {
      world.timers.push(run);
      return () => void world.timers.splice(world.timers.indexOf(run), 1);
    },
    send: async (one) => {
      await Promise.resolve();
      world.sent.push(one.key);
      const refusal = world.answer(one);
      if (refusal) throw refusal;
      return { id: one.call } as CallDetail;
    },
    onDone: (one) => void world.done.push(one.key),
  });
  return { world, queue };
}
const settled = () => new Promise((resolve) => setTimeout(resolve, 5));

describe('actions kept on the phone', () => {
  it('are sent one after another in the order pressed, and forgotten once answered', async () => {
    const { world, queue } = phone();
    queue.startFor('u1');
    queue.add(action('a'));
    queue.add(action('b', { kind: 'onLane' }));
    await settled();
    expect(world.sent).toEqual(['a', 'b']);
    expect(world.stored).toEqual([]);
    expect(world.done).toEqual(['a', 'b']);
  });

  it('stay, in order and with their keys, while the server is away, and are repeated by themselves', async () => {
    const { world, queue } = phone();
    world.answer = () => new Problem(0, 'network.away');
    queue.startFor('u1');
    queue.add(action('a'));
    queue.add(action('b', { kind: 'onLane' }));
    await settled();
    expect(queue.snapshot()).toMatchObject({ away: true, waiting: [{ key: 'a' }, { key: 'b' }] });
    expect(world.stored.map((one) => one.key)).toEqual(['a', 'b']);
    expect(world.sent).toEqual(['a']);
    world.answer = () => null;
    world.timers.at(-1)?.();
    await settled();
    expect(world.sent.slice(1)).toEqual(['a', 'b']);
    expect(queue.snapshot()).toMatchObject({ away: false, waiting: [] });
  });

  it('survive a page that is closed', async () => {
    const { world, queue } = phone([action('kept')]);
    queue.startFor('u1');
    await settled();
    expect(world.sent).toEqual(['kept']);
  });

  it('end with a refusal, and take with them what was pressed believing in them', async () => {
    const { world, queue } = phone();
    world.answer = (one) => (one.call === 'call-9' ? new Problem(409, 'call.already-acknowledged', { params: { by: 'Ives' } }) : null);
    queue.startFor('u1');
    queue.add(action('a'));
    queue.add(action('b', { kind: 'onLane' }));
    queue.add(action('c', { call: 'call-16' }));
    await settled();
    expect(world.sent).toEqual(['a', 'c']);
    expect(queue.snapshot().refused.map((one) => one.problem.code)).toEqual(['call.already-acknowledged']);
    queue.dismiss('a');
    expect(queue.snapshot()).toMatchObject({ refused: [], waiting: [] });
  });

  it('of another person on the same phone wait for that person', async () => {
    const { world, queue } = phone([action('hers', { user: 'u2' })]);
    queue.startFor('u1');
    queue.add(action('mine'));
    await settled();
    expect(world.sent).toEqual(['mine']);
    queue.startFor('u2');
    await settled();
    expect(world.sent).toEqual(['mine', 'hers']);
  });

  it('wait for a new sign-in instead of being lost', async () => {
    const { world, queue } = phone();
    world.answer = () => new Problem(401, 'session.none');
    queue.startFor('u1');
    queue.add(action('a'));
    await settled();
    expect(queue.snapshot()).toMatchObject({ waiting: [{ key: 'a' }], refused: [] });
  });
});
