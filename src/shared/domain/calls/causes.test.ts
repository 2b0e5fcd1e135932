import { describe, expect, it } from 'vitest';
import { EQUIPMENT } from '../equipment.ts';
import { CAUSES } from './causes-list.ts';
import { causeOf, causesFor, countsAs, mayBeCause, rankCauses } from './causes.ts';

describe('causes', () => {
  it('have codes of their own, led by their area', () => {
    expect(new Set(CAUSES.map((cause) => cause.code)).size).toBe(CAUSES.length);
    for (const cause of CAUSES) expect(cause.code.startsWith(`${cause.area}.`)).toBe(true);
  });

  it('offer at least one cause of its own for every equipment, and a way out', () => {
    for (const equipment of EQUIPMENT) {
      const areas = new Set(causesFor(equipment, null, null).map((cause) => cause.area));
      expect(areas.has('other')).toBe(true);
      expect(areas.size, equipment).toBeGreaterThan(3);
    }
  });

  it('keep string causes from a free-fall machine and the other way round', () => {
    const free = causesFor('pinsetter', null, 'free-fall').map((cause) => cause.code);
    const string = causesFor('pinsetter', null, 'string').map((cause) => cause.code);
    expect(free).toContain('distributor.pin-jam');
    expect(free).not.toContain('string.tangle');
    expect(string).toContain('string.tangle');
    expect(string).not.toContain('distributor.pin-jam');
    expect(string).toContain('rake.board-broken');
    expect(mayBeCause('string.tangle', 'free-fall')).toBe(false);
    expect(mayBeCause('string.tangle', null)).toBe(true);
    expect(mayBeCause('lift.blocked', 'free-fall')).toBe(true);
    expect(mayBeCause('constructor', null)).toBe(false);
  });

  it('count bowlers and foreign objects apart from the machine', () => {
    expect(countsAs('distributor.pin-jam')).toBe('machine-stop');
    expect(countsAs('bowler.ball-on-rake')).toBe('bowler');
    expect(countsAs('foreign.in-pit')).toBe('foreign-object');
    expect(countsAs('lift.belt-slips')).toBe('other');
    expect(countsAs('a-code-of-an-older-list')).toBe('machine-stop');
  });

  it('mark what chips pins and what means reaching in', () => {
    expect(causeOf('turret.wire-bent')).toMatchObject({ pinDamage: true, lockout: true });
    expect(causeOf('sensor.dirty')).toMatchObject({ pinDamage: false, lockout: false });
  });

  it('rank by how often this house had them', () => {
    const ranked = rankCauses(causesFor('ball-lift', null, null), { 'return.track-worn': 4, 'lift.blocked': 3 });
    expect(ranked.map((group) => group.area).slice(0, 3)).toEqual(['return', 'lift', 'electrical']);
    expect(ranked[0]?.causes.map((cause) => cause.code)).toEqual(['return.track-worn', 'return.ball-stuck']);
  });

  it('offer a danger its own answers only', () => {
    expect(new Set(causesFor('approach', 'wet-approach', null).map((cause) => cause.area))).toEqual(new Set(['danger']));
  });
});
