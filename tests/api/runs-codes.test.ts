import { beforeEach, describe, expect, it } from 'vitest';
import { fixedClock } from '#tests/support/clock.ts';
import { good } from '#tests/support/league-house.ts';
import { runEvents, runsHouse } from '#tests/support/runs-house.ts';
import { served } from '#tests/support/served.ts';

const START = '2026-05-14T18:00:00Z';
const clock = fixedClock(START);
const at = (minutes: number): number => Date.parse(START) + minutes * 60_000;
const house = () => runsHouse(server, at);
const { started, dressed } = runEvents(at);
const { server } = await served({ clock });
beforeEach(() => void clock.set(START));

describe('a machine that counts its runs from one every day', () => {
  it('writes over no run of the day before, whichever arrives first', async () => {
    const { send, runs, go, manager, written } = await house();
    const day = -24 * 60;
    const first = [started('1', [1, 2], day - 20), dressed('1', 1, day - 18), dressed('1', 2, day - 16), { type: 'run.finished', data: { machine: 'm1', run: '1' }, time: at(day - 15) }];
    const second = [started('1', [3], -20), dressed('1', 3, -18)];
    await send(...first);
    const before = await runs('2026-05-13');
    expect(before).toMatchObject([{ run: '1', status: 'finished', lanes: [1, 2], done: 2 }]);
    await send(...second);
    expect(await runs('2026-05-13')).toEqual(before);
    expect(await runs()).toMatchObject([{ run: '1', status: 'under-way', lanes: [3], done: 1 }]);
    expect((await written()).slice(1)).toEqual([2, 3]);
    const figures = good(await go(manager, 'GET', '/nights/2026-05-13')).body as { figures: { dressed: { lanes: number } } };
    expect(figures.figures.dressed.lanes).toBe(2);

    const other = await house();
    await other.send(...second);
    await other.send(...first);
    const view = async (of: typeof other) => [await of.runs('2026-05-13'), await of.runs()];
    expect(await view(other)).toEqual([before, await runs()]);
  });

  it('one that stands twice in a night is listed twice', async () => {
    const { send, runs } = await house();
    await send(started('1', [1], -40), dressed('1', 1, -38), { type: 'run.finished', data: { machine: 'm1', run: '1' }, time: at(-37) }, started('1', [1], -10), dressed('1', 1, -8));
    expect((await runs()).map(({ key, status, done }) => [key, status, done])).toEqual([[`m1/1/${at(-40)}`, 'finished', 1], [`m1/1/${at(-10)}`, 'under-way', 1]]);
  });
});
