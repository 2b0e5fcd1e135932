import { boardProfile, filmCells, filmMap } from '#shared/domain/runs/film.ts';
import { BOARDS, type PatternRevision } from '#shared/domain/runs/pattern.ts';
import { patternsText as text, ratioText } from '#shared/text/en/runs-page.ts';

const LANE_FT = 60;
const CELL = 5;
const FOOT = 8;

/** The film as it lies: foul line below, 60 ft up, every board of every foot as dark as what was laid there. */
export function FilmFromAbove({ revision }: { revision: PatternRevision }) {
  const map = filmMap(revision);
  const cells = filmCells(map);
  const most = Math.max(1, ...cells);
  const height = LANE_FT * FOOT;
  return (
    <svg role="img" aria-label={text.fromAboveLabel(revision.lengthFt)} viewBox={`0 0 ${BOARDS * CELL} ${height}`} className="h-[30rem] w-auto max-w-full">
      <rect width={BOARDS * CELL} height={height} fill="var(--pine)" />
      {Array.from(cells, (nl, i) => (nl === 0 ? null : (
        <rect key={i} x={(i % BOARDS) * CELL} y={height - (Math.floor(i / BOARDS) + 1) * FOOT * map.stepFt} width={CELL} height={FOOT * map.stepFt} fill="var(--film)" opacity={0.2 + (0.8 * nl) / most} />
      )))}
      <line x1={0} x2={BOARDS * CELL} y1={height - 1} y2={height - 1} stroke="var(--ink)" strokeWidth={3} />
    </svg>
  );
}

/** What lies across the boards, summed along the lane. */
export function BoardBars({ revision, ratio }: { revision: PatternRevision; ratio: { left: number | null; right: number | null } }) {
  const profile = boardProfile(filmMap(revision));
  const most = Math.max(1, ...profile);
  return (
    <svg role="img" aria-label={text.acrossLabel(ratioText(ratio.left), ratioText(ratio.right))} viewBox="0 0 390 120" className="w-full max-w-[36rem]">
      {profile.map((nl, i) => <rect key={i} x={i * 10 + 1} y={100 - (96 * nl) / most} width={8} height={(96 * nl) / most} fill="var(--film)" />)}
      <line x1={0} x2={390} y1={100} y2={100} stroke="var(--ink)" strokeWidth={1.5} />
      {[5, 10, 15, 20, 25, 30, 35].map((board) => (
        <text key={board} x={board * 10 - 5} y={116} textAnchor="middle" fontSize={12} fill="var(--dim)">{board <= 20 ? `${board}L` : `${BOARDS + 1 - board}R`}</text>
      ))}
    </svg>
  );
}
