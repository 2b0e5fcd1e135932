import { BOARDS } from './pattern.ts';

/** Exact by definition of the international inch. */
export const MM_PER_INCH = 25.4;
export const IN_PER_FT = 12;

/** Nominal width of a lane; 41–42 in are allowed (USBC Equipment Specifications Manual, as quoted in articles). */
export const LANE_WIDTH_IN = 41.5;

/** One unit of oil, mL a square foot: a film of about 7 millionths of an inch (trade figure, from memory). */
export const UNIT_ML_PER_SQ_FT = 0.0167;

export const feetToMetres = (ft: number): number => (ft * IN_PER_FT * MM_PER_INCH) / 1000;
export const metresToFeet = (m: number): number => (m * 1000) / MM_PER_INCH / IN_PER_FT;
/** Travel speed of a pass (tenths of in/s) in mm/s. */
export const speedToMmPerSecond = (tenthsInPerSecond: number): number => (tenthsInPerSecond * MM_PER_INCH) / 10;

export const boardWidthIn = (laneWidthIn: number = LANE_WIDTH_IN): number => laneWidthIn / BOARDS;
export const boardWidthMm = (laneWidthIn: number = LANE_WIDTH_IN): number => boardWidthIn(laneWidthIn) * MM_PER_INCH;

/** Distance of a board's middle from the left edge, inches; `board` 1–39. */
export const boardCentreIn = (board: number, laneWidthIn: number = LANE_WIDTH_IN): number => (board - 0.5) * boardWidthIn(laneWidthIn);

/** Area of one board over one foot, square feet. */
export const boardFootSqFt = (laneWidthIn: number = LANE_WIDTH_IN): number => boardWidthIn(laneWidthIn) / IN_PER_FT;

/** Units of oil from µL on a board-foot. */
export const unitsFromUl = (ulPerBoardFoot: number, laneWidthIn: number = LANE_WIDTH_IN): number =>
  ulPerBoardFoot / (UNIT_ML_PER_SQ_FT * 1000 * boardFootSqFt(laneWidthIn));

/** µL on a board-foot from units of oil. */
export const ulFromUnits = (units: number, laneWidthIn: number = LANE_WIDTH_IN): number =>
  units * UNIT_ML_PER_SQ_FT * 1000 * boardFootSqFt(laneWidthIn);

/** Thickness of an even film in µm from µL on a board-foot (1 µL = 1 mm³). */
export const filmMicrometres = (ulPerBoardFoot: number, laneWidthIn: number = LANE_WIDTH_IN): number =>
  (ulPerBoardFoot / (boardWidthMm(laneWidthIn) * IN_PER_FT * MM_PER_INCH)) * 1000;

/** Thickness in millionths of an inch from µm. */
export const microinches = (micrometres: number): number => (micrometres / MM_PER_INCH) * 1000;
