import { boardProfile, filmCells, filmMap } from '#shared/domain/runs/film.ts';
import { BOARDS, type PatternRevision } from '#shared/domain/runs/pattern.ts';
import { patternsText as text, ratioText } from '#shared/text/en/runs-page.ts';

const LANE_FT = 60;
const CELL = 5;
const FOOT = 8;
/** Room for the feet beside the lane. */
const SCALE = 34;
const BOARDS_PX = BOARDS * CELL;
/** Arrows stand 12 to 16 ft beyond the foul line on boards 5, 10, 15 … of either side (USBC equipment specifications, from memory: drawn, not measured by). */
const ARROWS = [[5, 12], [10, 13], [15, 14.5], [20, 16], [25, 14.5], [30, 13], [35, 12]] as const;

/** The film as it lies: foul line below, 60 ft up, every board of every foot as dark as what was laid there. */
export function FilmFromAbove({ revision }: { revision: PatternRevision }) {
  const map = filmMap(revision);
  const cells = filmCells(map);
  const most = Math.max(1, ...cells);
  const height = LANE_FT * FOOT;
  const y = (ft: number): number => height - ft * FOOT;
  return (
    <svg role="img" aria-label={text.fromAboveLabel(revision.lengthFt)} viewBox={`-1 -8 ${BOARDS_PX + SCALE + 1} ${height + 18}`} className="h-[30rem] w-auto max-w-full max-[900px]:h-[22rem]">
      <rect width={BOARDS_PX} height={height} fill="var(--pine)" />
      <g shapeRendering="crispEdges">
        {Array.from(cells, (nl, i) => (nl === 0 ? null : (
          <rect key={i} x={(i % BOARDS) * CELL} y={y((Math.floor(i / BOARDS) + 1) * map.stepFt)} width={CELL} height={FOOT * map.stepFt} fill="var(--film)" opacity={0.2 + (0.8 * nl) / most} />
        )))}
      </g>
      {ARROWS.map(([board, ft]) => <path key={board} d={`M${board * CELL - CELL / 2} ${y(ft) - 7}l3.4 8h-6.8z`} fill="var(--on-wood)" opacity={0.6} />)}
      <line x1={0} x2={BOARDS_PX} y1={height} y2={height} stroke="var(--ink)" strokeWidth={3} />
      {[0, 10, 20, 30, 40, 50, 60].map((ft) => (
        <g key={ft}>
          <line x1={BOARDS_PX} x2={BOARDS_PX + 5} y1={y(ft)} y2={y(ft)} stroke="var(--line)" strokeWidth={1.5} />
          <text x={BOARDS_PX + 9} y={y(ft) + 4.5} fontSize={12.5} fill="var(--dim)">{ft}</text>
        </g>
      ))}
      <line x1={0} x2={BOARDS_PX} y1={y(revision.lengthFt)} y2={y(revision.lengthFt)} stroke="var(--film-edge)" strokeWidth={1.5} strokeDasharray="4 3" />
    </svg>
  );
}

/** What lies across the boards, summed along the lane: a small picture that stands for the pattern. */
export function FilmProfile({ boardsNl, className }: { boardsNl: readonly number[]; className?: string }) {
  const most = Math.max(1, ...boardsNl);
  return (
    <svg aria-hidden viewBox={`0 0 ${BOARDS * 4} 40`} className={className}>
      {boardsNl.map((nl, i) => <rect key={i} x={i * 4} y={39 - (38 * nl) / most} width={3} height={(38 * nl) / most} fill="var(--film)" />)}
      <line x1={0} x2={BOARDS * 4} y1={39.5} y2={39.5} stroke="var(--line)" strokeWidth={1} />
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

/** More above the line, less below it, by board. */
export function DifferenceBars({ differenceUl, className }: { differenceUl: readonly number[]; className?: string }) {
  const most = Math.max(1, ...differenceUl.map(Math.abs));
  return (
    <svg aria-hidden viewBox={`0 0 ${BOARDS * 4} 40`} className={className}>
      {differenceUl.map((ul, i) => <rect key={i} x={i * 4} y={ul > 0 ? 20 - (19 * ul) / most : 20} width={3} height={(19 * Math.abs(ul)) / most} fill={ul > 0 ? 'var(--film)' : 'var(--amber)'} />)}
      <line x1={0} x2={BOARDS * 4} y1={20} y2={20} stroke="var(--line)" strokeWidth={1} />
    </svg>
  );
}
