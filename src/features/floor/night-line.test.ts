import { describe, expect, it } from 'vitest';
import type { RunBar, SessionBar } from '#shared/contracts/floor.ts';
import { timeOfDay } from '#shared/text/en/formats.ts';
import { hourTicks, layoutNight, type NightItem } from './night-line.ts';

const HOUR = 3_600_000;
const NOW = Date.parse('2026-05-14T18:42:00Z');
const at = (time: string) => Date.parse(`2026-05-14T${time}:00Z`);
const session = (id: string, warmUp: string, start: string, end: string, change: Partial<SessionBar> = {}): SessionBar => ({
  id, name: `League ${id}`, kind: 'league', fromLane: 1, toLane: 12, warmUpAt: at(warmUp), startAt: at(start), endAt: at(end), phase: 'now', verdict: null, says: null, lanes: [],
  confirmed: null, game: null, frame: null, ...change,
});
const run = (key: string, start: string, end: string): RunBar => ({
  key, run: key, machine: 'm', status: 'finished', pattern: null, verified: true, lanes: [1, 2, 3], done: 3, startAt: at(start), endAt: at(end), forecast: false, laneNow: null,
});
const measure = (text: string) => text.length * 6;

const boxes = (item: NightItem) => {
  const bar = { from: item.x - item.warmUp, to: item.x + item.width };
  return item.label && !item.label.inside ? [bar, { from: item.label.x, to: item.label.x + item.label.width }] : [bar];
};

describe('the night line', () => {
  const sessions = [
    session('a', '17:50', '18:00', '20:40'), session('b', '18:05', '18:15', '20:30'), session('c', '19:05', '19:15', '21:40'), session('d', '20:05', '20:15', '22:30'),
    session('old', '13:00', '13:10', '16:10', { phase: 'past' }), session('gone', '09:00', '09:10', '12:00', { phase: 'past' }),
  ];
  const runs = [run('116', '17:10', '17:35'), run('117', '17:45', '18:00'), run('118', '18:30', '18:45'), run('119', '19:40', '19:50')];
  const night = layoutNight(sessions, runs, NOW, 1084, measure);

  it('shows three hours before and six after, by whole hours', () => {
    expect([night.to - night.from, night.from % HOUR]).toEqual([9 * HOUR, 0]);
    expect(night.items.map((i) => i.key)).not.toContain('gone');
  });
  it('in no row do two bars or labels touch, and all stay inside', () => {
    for (let row = 0; row < night.rows; row++) {
      const placed = night.items.filter((i) => i.row === row).flatMap(boxes).sort((a, b) => a.from - b.from);
      for (let i = 1; i < placed.length; i++) expect(placed[i]!.from).toBeGreaterThanOrEqual(placed[i - 1]!.to);
      expect(placed[0]!.from).toBeGreaterThanOrEqual(0);
      expect(placed.at(-1)!.to).toBeLessThanOrEqual(1084);
    }
  });
  it('draws the warm-up before the play, to scale', () => {
    const a = night.items.find((i) => i.key === 'a')!;
    expect(a.warmUp).toBeGreaterThan(1084 * (9 / 540) - 2);
    expect(a.x - a.warmUp).toBe(Math.round(((at('17:50') - night.from) / (9 * HOUR)) * 1084));
  });
  it('a short run carries its label beside it', () => expect(night.items.find((i) => i.key === '118')!.label).toMatchObject({ inside: false, text: '118 · 1–3' }));
  it('a look says phase and verdict', () => {
    const looks = layoutNight([session('x', '20:00', '20:10', '22:00', { phase: 'later', verdict: 'held' }), session('y', '20:00', '20:10', '22:00', { phase: 'later', verdict: 'planned' })], [], NOW, 900, measure);
    expect(looks.items.map((i) => i.look).sort()).toEqual(['held', 'plan']);
  });
});

describe('hours of the centre', () => {
  const minuteIn = (zone: string) => (t: number) => Number(timeOfDay(t, zone).slice(3));
  it('stand at full local hours in a half-hour zone', () => {
    const ticks = hourTicks(at('10:00'), at('13:00'), 300, minuteIn('Asia/Kolkata'));
    expect(ticks.map((t) => timeOfDay(t.at, 'Asia/Kolkata'))).toEqual(['16:00', '17:00', '18:00']);
  });
  it('count the repeated hour twice when clocks go back', () => {
    const from = Date.parse('2026-10-25T00:00:00Z');
    expect(hourTicks(from, from + 3 * HOUR, 300, minuteIn('Europe/London')).map((t) => timeOfDay(t.at, 'Europe/London'))).toEqual(['01:00', '01:00', '02:00']);
  });
});
