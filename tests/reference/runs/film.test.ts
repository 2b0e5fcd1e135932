import { describe, expect, it } from 'vitest';
import { boardProfile, filmMap, filmTotal } from '#shared/domain/runs/film.ts';
import { ulPerBoardFoot } from '#shared/domain/runs/film-facts.ts';
import { parseBoard, type BoardCode, type Pass } from '#shared/domain/runs/pattern.ts';
import * as units from '#shared/domain/runs/units.ts';
import { passVolume } from '#shared/domain/runs/volume.ts';

const pass = (from: string, to: string, loads: number, ul: number): Pass => ({
  direction: 'outbound', fromBoard: parseBoard(from) as BoardCode, toBoard: parseBoard(to) as BoardCode, loads, ul, product: 'A', fromFt: 0, toFt: 40,
});

// Volumes as operators work them out by hand (common practice).
describe('worked volumes', () => {
  it.each([[2, 50, 3700], [3, 50, 5550], [3, 40, 4440]])('%i loads on 37 boards at %i µL are %i µL', (loads, ul, expected) => {
    expect(passVolume(pass('2L', '2R', loads, ul))).toBe(expected);
    expect(filmTotal(filmMap({ lengthFt: 40, passes: [pass('2L', '2R', loads, ul)] }))).toBe(expected * 1000);
  });
  it('8L to 8R is 25 boards', () => {
    expect(passVolume(pass('8L', '8R', 1, 1))).toBe(25);
  });
});

// Lane width 41 1/2 in and 39 boards: USBC Equipment Specifications Manual, as quoted in articles.
// A unit of 0.0167 mL a square foot is from memory; it agrees with itself (about 7 millionths of an inch).
describe('board-foot arithmetic', () => {
  const close = (value: number, expected: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(1e-9);

  it('knows the board', () => {
    close(units.boardWidthIn(), 1.0641025641025641);
    close(units.boardWidthMm(), 27.0282051282051282);
    expect(units.boardWidthIn(41)).toBeCloseTo(1.0512820513, 10);
    expect(units.boardWidthIn(42)).toBeCloseTo(1.0769230769, 10);
    expect(units.boardFootSqFt()).toBeCloseTo(0.0886752137, 10);
    expect(units.boardFootSqFt() * 144).toBeCloseTo(12.7692307692, 10);
    for (const [board, inches] of [[1, 0.5321], [5, 4.7885], [10, 10.109], [20, 20.75], [39, 40.9679]] as const) expect(units.boardCentreIn(board)).toBeCloseTo(inches, 4);
  });

  it('turns µL on a board-foot into units and thickness', () => {
    expect(units.filmMicrometres(1)).toBeCloseTo(0.1213857849, 10);
    expect(units.microinches(units.filmMicrometres(1))).toBeCloseTo(4.7789679113, 9);
    expect(units.ulFromUnits(1)).toBeCloseTo(1.4808760684, 10);
    expect(units.filmMicrometres(units.ulFromUnits(1))).toBeCloseTo(0.179757304, 9);
    expect(units.microinches(units.filmMicrometres(units.ulFromUnits(1)))).toBeCloseTo(7.077059211, 8);
    expect(units.unitsFromUl(5)).toBeCloseTo(3.3763797706, 9);
    expect(units.filmMicrometres(5)).toBeCloseTo(0.6069289247, 9);
    expect((units.ulFromUnits(3) * 39 * 40) / 1000).toBeCloseTo(6.9305, 4);
  });

  it.each([[35, 12.368], [37, 11.699], [39, 11.099], [40, 10.8217300339], [42, 10.306], [45, 9.619]])('25 mL flat over %i ft', (feet, expected) => {
    expect(units.unitsFromUl(25_000 / 39 / feet)).toBeCloseTo(expected, 3);
  });

  it('agrees with the map: 40 µL on one board over 8 ft', () => {
    const one = { ...pass('10L', '10L', 1, 40), toFt: 8 };
    const map = filmMap({ lengthFt: 40, passes: [one] });
    const cell = ulPerBoardFoot(map, map.layers[0]?.cells[9] ?? 0);
    expect(units.unitsFromUl(cell)).toBeCloseTo(3.3763797706, 9);
    expect(boardProfile(map)[9]).toBe(40_000);
  });

  it('changes no volume when feet become metres', () => {
    expect(units.feetToMetres(60)).toBeCloseTo(18.288, 12);
    for (const ft of [0.1, 7, 41.5]) expect(units.metresToFeet(units.feetToMetres(ft))).toBeCloseTo(ft, 12);
    expect(units.speedToMmPerSecond(180)).toBeCloseTo(457.2, 10);
  });
});
