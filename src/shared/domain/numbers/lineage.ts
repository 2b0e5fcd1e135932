import { demandAmount } from './demand.ts';

/** Frames in a game. */
export const FRAMES_A_GAME = 10;

/** Lineage: games' worth of frames, frames ÷ 10, fractions kept. Common practice of the trade. */
export function lineage(frames: number): number {
  demandAmount('frames', frames);
  return frames / FRAMES_A_GAME;
}
