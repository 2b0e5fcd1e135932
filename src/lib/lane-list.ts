/** Lanes as people write them (`25–32`, `19-24, 17`) in that order; null when it can't be read. */
export function parseLanes(text: string): number[] | null {
  const parts = text.split(',').map((part) => part.trim()).filter((part) => part !== '');
  const lanes: number[] = [];
  for (const part of parts) {
    const range = /^(\d{1,2})(?:\s*[-–]\s*(\d{1,2}))?$/.exec(part);
    if (!range) return null;
    const from = Number(range[1]);
    const to = Number(range[2] ?? range[1]);
    const step = to >= from ? 1 : -1;
    for (let lane = from; lane !== to + step; lane += step) lanes.push(lane);
  }
  return lanes.length > 0 ? lanes : null;
}
