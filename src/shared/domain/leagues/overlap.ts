/** A stretch of lanes and time that somebody has booked: [from, to), instants in ms. */
export interface Booked {
  id: string;
  lanes: readonly number[];
  from: number;
  to: number;
}

/** Do two bookings want one lane at one moment? An end and a start at the same instant don't meet. */
export function overlaps(a: Booked, b: Booked): boolean {
  return a.from < b.to && b.from < a.to && a.lanes.some((lane) => b.lanes.includes(lane));
}

/** The first other booking in the way, by time; null when nothing is. */
export function firstOverlap(wanted: Booked, others: readonly Booked[]): { other: Booked; lanes: number[] } | null {
  const inTheWay = others.filter((other) => other.id !== wanted.id && overlaps(wanted, other)).sort((a, b) => a.from - b.from);
  const other = inTheWay[0];
  return other ? { other, lanes: wanted.lanes.filter((lane) => other.lanes.includes(lane)) } : null;
}
