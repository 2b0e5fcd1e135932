import { memo, useState } from 'react';
import type { LaneView } from '#shared/contracts/floor.ts';
import { laneSentence } from '#shared/text/en/floor.ts';
import { useNow } from '../../../lib/clock.ts';
import { useLane } from '../board-context.ts';
import type { Heights } from '../board-layout.ts';
import { changeSignature, markOf } from '../lane-mark.ts';
import { Boards } from './boards.tsx';
import { Cap } from './cap.tsx';
import { Pins } from './pins.tsx';

interface Props {
  lane: number;
  x: number;
  width: number;
  heights: Heights;
  /** Size of the figure, px. */
  figure: number;
  selected: boolean;
  /** Null on the wall, where nothing is pressed. */
  onSelect: ((lane: number) => void) | null;
}

const TICK_MS = 1000;
/** A lane without a running clock still ages its sentence. */
const REST_MS = 30_000;

/** Counts how often a value changed since it was first drawn: the key of what flashes once. */
function useChanges(value: string): number {
  const [seen, setSeen] = useState({ value, count: 0 });
  if (seen.value === value) return seen.count;
  setSeen({ value, count: seen.count + 1 });
  return seen.count + 1;
}

/** One lane of the house, machine on top, foul line below. Fixed size; drawn again only when its own view changes. */
export const LaneStrip = memo(function LaneStrip(props: Props) {
  const view = useLane(props.lane);
  return view ? <Drawn {...props} view={view} /> : null;
});

function Drawn({ view, x, width, heights, figure, selected, onSelect }: Props & { view: LaneView }) {
  const { mark, since } = markOf(view);
  const now = useNow(since !== null || view.dressing ? TICK_MS : REST_MS);
  const changes = useChanges(changeSignature(view));
  const content = (
    <>
      <Cap mark={mark} since={since} now={now} width={width} height={heights.cap} />
      {heights.deck === 0 ? null : <span className="deck">{view.machine === 'unknown' ? null : <Pins standing={view.pins} />}</span>}
      <Boards view={view} now={now} width={width} height={heights.lane - 5} />
      <span className="approach">
        <span key={changes} className={changes > 0 ? 'figure flash' : 'figure'} style={{ fontSize: figure }}>
          {view.lane}
        </span>
      </span>
    </>
  );
  const marks = {
    'className': 'strip',
    'aria-label': laneSentence(view, now),
    'data-lane': view.lane,
    'data-mark': mark,
    'data-use': view.use ? view.use.kind : 'free',
    'data-dressing': view.dressing !== null,
    'data-unheard': view.unheard,
    'style': { left: x, width },
  };
  if (!onSelect) return <div role="img" {...marks}>{content}</div>;
  return (
    <button type="button" {...marks} aria-pressed={selected} onClick={() => onSelect(view.lane)}>
      {content}
    </button>
  );
}
