import { useMemo } from 'react';
import { floorWords } from '#shared/text/en/floor-page.ts';
import { useLiveness } from '../../../lib/live.ts';
import { DESK, deskFace, heightsOf, layoutBoard, numberSize, WALL, wallFace } from '../board-layout.ts';
import { useBars } from '../use-bars.ts';
import { useSize } from '../use-size.ts';
import { PlanBank } from './plan-bank.tsx';

interface Props {
  selected: number | null;
  onSelect: ((lane: number) => void) | null;
  sessionAddress: ((session: string) => string) | null;
  /** On the wall figures are 79 px high and the lanes stand in banks of at most sixteen. */
  wall?: boolean;
}

const bankGap = (wall: boolean, banks: number): number => (wall && banks > 2 ? 8 : 18);
/** Archivo's figures are 0.7 of its size: 79 px of height. */
const WALL_FIGURE = Math.ceil(79 / 0.7);

/** The house from above. It fills what room there is; beyond 64 lanes or on a low window it scrolls. */
export function Plan({ selected, onSelect, sessionAddress, wall = false }: Props) {
  const [ref, size] = useSize();
  const { count, now, next } = useBars();
  const stale = useLiveness().state === 'stale';
  const drawn = useMemo(() => {
    if (!size || count === 0) return null;
    const layout = layoutBoard(count, size.width, wall ? WALL : DESK);
    const figure = wall ? WALL_FIGURE : numberSize(layout.strip);
    const banks = layout.banks.length;
    const face = wall ? wallFace(figure, banks) : deskFace(layout.strip, figure);
    return { layout, figure, heights: heightsOf(Math.floor((size.height - (banks - 1) * bankGap(wall, banks)) / banks), face) };
  }, [size, count, wall]);
  return (
    <section ref={ref} aria-label={floorWords.plan} className={wall ? 'plan plan-wall relative min-h-0 grow' : 'plan relative min-h-0 grow'} data-stale={stale}>
      {drawn ? (
        <div className="flex flex-col" style={{ gap: bankGap(wall, drawn.layout.banks.length), width: drawn.layout.width }}>
          {drawn.layout.banks.map((bank) => (
            <PlanBank key={bank.strips[0]?.lane} bank={bank} heights={drawn.heights} figure={drawn.figure} now={now} next={next} selected={selected} onSelect={onSelect} sessionAddress={sessionAddress} />
          ))}
        </div>
      ) : null}
    </section>
  );
}
