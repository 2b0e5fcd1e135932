import type { CSSProperties } from 'react';
import { Link } from 'react-router-dom';
import { FitText } from '../../../ui/fit-text.tsx';
import type { Bar } from '../bars.ts';
import { useBoard } from '../board-context.ts';
import { type Bank, type Heights, spanIn } from '../board-layout.ts';
import { LaneStrip } from './lane-strip.tsx';

interface Props {
  bank: Bank;
  heights: Heights;
  figure: number;
  now: readonly Bar[];
  next: readonly Bar[];
  selected: number | null;
  onSelect: ((lane: number) => void) | null;
  /** Address of a session's page; null where nobody may see it. */
  sessionAddress: ((session: string) => string) | null;
}

/** Lanes side by side as they stand, ball returns between the pairs, under them who is there and what comes next. */
export function PlanBank({ bank, heights, figure, now, next, selected, onSelect, sessionAddress }: Props) {
  const sizes = {
    '--bank-h': `${heights.bank}px`, '--strip-h': `${heights.strip}px`, '--cap-h': `${heights.cap}px`, '--deck-h': `${Math.max(0, heights.deck - 2)}px`,
    '--lane-h': `${heights.lane}px`, '--approach-h': `${heights.approach}px`, '--bar-h': `${heights.bar}px`,
  } as CSSProperties;
  const row = (bars: readonly Bar[], top: number) =>
    bars.map((bar) => {
      const span = spanIn(bank, bar.from, bar.to);
      return span ? <PlanBar key={bar.key} bar={bar} {...span} top={top} tall={heights.bar} address={sessionAddress && bar.session ? sessionAddress(bar.session) : null} /> : null;
    });
  return (
    <div className="bank" style={sizes}>
      {bank.strips.map((strip) => (
        <LaneStrip key={strip.lane} {...strip} heights={heights} figure={figure} selected={selected === strip.lane} onSelect={onSelect} />
      ))}
      <Returns bank={bank} heights={heights} />
      {row(now, heights.strip + heights.barGap)}
      {heights.rows < 2 ? null : row(next, heights.strip + heights.bar + 2 * heights.barGap)}
    </div>
  );
}

function PlanBar({ bar, x, width, top, tall, address }: { bar: Bar; x: number; width: number; top: number; tall: number; address: string | null }) {
  const pad = width < 90 ? 5 : 9;
  const size = Math.round(tall * 0.47);
  const place = { className: 'bar', 'data-look': bar.look, title: [bar.text.title, ...bar.text.second].join(' · '), style: { left: x, width, top, paddingInline: pad } };
  const text = <FitText title={bar.text.title} short={bar.text.short} seconds={bar.text.second} width={width - 2 * pad} size={size} />;
  const name = [bar.text.title, ...bar.text.second].join(', ');
  return address ? (
    <Link to={address} aria-label={name} {...place}>
      {text}
    </Link>
  ) : (
    <div role="note" aria-label={name} {...place}>
      {text}
    </div>
  );
}

/** Ball returns stand on the approach between the lanes of a pair; one with an open call is red and its lanes say so. */
function Returns({ bank, heights }: { bank: Bank; heights: Heights }) {
  const calls = useBoard('calls') ?? [];
  const down = new Set(calls.filter((c) => (c.equipment === 'ball-return' || c.equipment === 'ball-lift') && c.returnedAt === null).map((c) => (c.lane % 2 === 1 ? c.lane : c.lane - 1)));
  const top = heights.cap + heights.deck + heights.lane + Math.round(heights.approach * 0.18);
  return bank.returns.map((place) => (
    <span key={place.pair} aria-hidden className="return" data-down={down.has(place.pair)} style={{ left: place.x, width: place.width, top, height: Math.round(heights.approach * 0.64) }} />
  ));
}
