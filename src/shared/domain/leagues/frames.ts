import { FRAMES_A_GAME } from '../numbers/lineage.ts';

/** Deliveries of one bowler's frame: one (strike) or two, in the tenth up to three. Rules of tenpin, common to all associations. */
export function deliveriesBounds(frame: number): { least: number; most: number } {
  if (!Number.isInteger(frame) || frame < 1 || frame > FRAMES_A_GAME) throw new RangeError(`a game has frames 1 to 10, got ${frame}`);
  return frame === FRAMES_A_GAME ? { least: 2, most: 3 } : { least: 1, most: 2 };
}

/** Deliveries of one complete game: 11 (nine strikes, an open tenth) to 21. */
export function deliveriesAGame(): { least: number; most: number } {
  let least = 0;
  let most = 0;
  for (let frame = 1; frame <= FRAMES_A_GAME; frame += 1) {
    least += deliveriesBounds(frame).least;
    most += deliveriesBounds(frame).most;
  }
  return { least, most };
}

/** How a session is bowled on one pair. */
export interface PairFormat {
  /** Names on the score sheets of the pair: both teams. */
  bowlers: number;
  games: number;
  /** Of those, how many don't bowl: blinds, vacancies, and the whole team of a bye. */
  absent: number;
}

/**
 * Frames expected on one lane: bowlers on the pair × games × 10 ÷ 2, less blinds, vacancies and byes (common practice;
 * with crossing, five frames of each game fall on each lane: USBC rule 106a as quoted in its questions and answers).
 * A forecast, never a count.
 */
export function framesOnLane(format: PairFormat): number {
  const bowling = Math.max(0, format.bowlers - format.absent);
  return (bowling * format.games * FRAMES_A_GAME) / 2;
}

/** Frames on the one lane that is left when the other of its pair is down: all of the pair. */
export const framesOnOneLane = (format: PairFormat): number => 2 * framesOnLane(format);

/**
 * Frames that a lane has behind it at a game and frame of its bowlers (the frame under way isn't done yet).
 * When they cross, a frame of everybody on the pair counts half on each lane.
 */
export function framesDone(format: PairFormat, game: number, frame: number): number {
  const rounds = (Math.max(1, game) - 1) * FRAMES_A_GAME + Math.max(1, frame) - 1;
  const done = (rounds * Math.max(0, format.bowlers - format.absent)) / 2;
  return Math.min(framesOnLane(format), done);
}

/** Bowlers of a pair: two teams. */
export const bowlersOnPair = (bowlersATeam: number): number => 2 * bowlersATeam;
