/** Typing a lane's number anywhere on the floor. Pure: keys in, what to show and to select out. */
export interface Typing {
  digits: string;
  /** Lane to select now; null: wait for another digit or the pause. */
  select: number | null;
}

/** How long another digit is waited for where a longer number exists (1 … 12), ms. */
export const TYPING_PAUSE_MS = 700;

/**
 * Takes one digit. It selects at once when no longer number of this house begins with what was typed, else at the pause
 * (`settle`). A digit that leads to no lane begins anew.
 */
export function typeDigit(before: string, digit: string, lanes: number): Typing {
  const joined = Number(before + digit) >= 1 && Number(before + digit) <= lanes ? before + digit : digit;
  const lane = Number(joined);
  if (lane < 1) return { digits: '', select: null };
  if (lane > lanes) return { digits: joined, select: null };
  return { digits: joined, select: lane * 10 > lanes ? lane : null };
}

/** The pause is over: the lane that was meant, or null when there is none of that number. */
export const settle = (digits: string, lanes: number): number | null => {
  const lane = Number(digits);
  return lane >= 1 && lane <= lanes ? lane : null;
};
