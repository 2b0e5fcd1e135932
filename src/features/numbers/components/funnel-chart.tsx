import { Area, CartesianGrid, ComposedChart, Line, ReferenceLine, ResponsiveContainer, Scatter, XAxis, YAxis } from 'recharts';
import type { FunnelView } from '#shared/contracts/numbers.ts';
import { number } from '#shared/text/en/formats.ts';
import { wording } from '#shared/text/en/numbers.ts';

interface Dot {
  cx?: number;
  cy?: number;
  payload?: { lane: number; position: FunnelView['lanes'][number]['position'] };
}

/** A lane: a quiet dot inside the band; its number in a ring or a filled disc outside. */
function LaneDot({ cx = 0, cy = 0, payload }: Dot) {
  if (!payload || payload.position === 'inside') return <circle cx={cx} cy={cy} r={4.5} fill="var(--ink)" opacity={0.55} />;
  const far = payload.position === 'above-outer';
  const high = payload.position === 'above-inner';
  return (
    <g>
      <circle cx={cx} cy={cy} r={12} fill={far ? 'var(--red)' : high ? 'var(--amber-fill)' : 'var(--paper)'} stroke={far || high ? 'none' : 'var(--ink)'} strokeWidth={2} />
      <text x={cx} y={cy + 4.5} textAnchor="middle" fontSize={13} fontWeight={760} fill={far ? 'var(--on-red)' : high ? 'var(--on-amber)' : 'var(--ink)'}>
        {payload.lane}
      </text>
    </g>
  );
}

/** Round numbers of frames within a span: every so many thousand, at most eight. */
function thousands(from: number, to: number): number[] {
  const step = [500, 1000, 2000, 5000, 10_000, 20_000].find((s) => (to - from) / s <= 8) ?? 50_000;
  const first = Math.ceil(from / step) * step;
  return Array.from({ length: Math.max(0, Math.floor((to - first) / step) + 1) }, (_, i) => first + i * step);
}

const halves = (top: number): number[] => Array.from({ length: Math.round(top * 2) + 1 }, (_, i) => i / 2).filter((v) => top <= 4 || Number.isInteger(v));

const axis = { stroke: 'var(--rule)', tick: { fill: 'var(--dim)', fontSize: 13 } };

/** Lanes by frames and rate, over the band that chance allows. */
export function FunnelChart({ data }: { data: FunnelView }) {
  const limits = data.limits.map((l) => ({ frames: l.frames, band: [l.low95, l.high95], low998: l.low998, high998: l.high998 }));
  const lanes = data.lanes.filter((l) => l.perThousand !== null).sort((a, b) => Number(a.position !== 'inside') - Number(b.position !== 'inside'));
  const top = Math.ceil(Math.max(...limits.map((l) => l.high998), ...lanes.map((l) => l.perThousand ?? 0)) * 2) / 2;
  const frames = thousands(Math.min(...limits.map((l) => l.frames)), Math.max(...limits.map((l) => l.frames)));
  return (
    <figure role="img" aria-label={wording.funnelLabel(data.finding)} className="m-0 h-[min(56vh,34rem)] min-h-72 w-full">
      <ResponsiveContainer width="100%" height="100%">
        <ComposedChart margin={{ top: 12, right: 20, bottom: 34, left: 8 }} accessibilityLayer={false}>
          <CartesianGrid vertical={false} stroke="var(--rule)" />
          <XAxis type="number" dataKey="frames" domain={['dataMin', 'dataMax']} ticks={frames} tickFormatter={(v: number) => number(v)} {...axis} label={{ value: wording.axisFrames, position: 'bottom', offset: 12, fill: 'var(--dim)', fontSize: 13 }} />
          <YAxis type="number" domain={[0, top]} ticks={halves(top)} width={34} {...axis} />
          <Area data={limits} dataKey="band" stroke="none" fill="var(--pine)" fillOpacity={0.42} isAnimationActive={false} activeDot={false} />
          <Line data={limits} dataKey="high998" stroke="var(--amber)" strokeDasharray="6 5" dot={false} isAnimationActive={false} activeDot={false} />
          <Line data={limits} dataKey="low998" stroke="var(--amber)" strokeDasharray="6 5" dot={false} isAnimationActive={false} activeDot={false} />
          {data.overall ? <ReferenceLine y={data.overall.perThousand} stroke="var(--ink)" strokeWidth={2} /> : null}
          <Scatter data={lanes} dataKey="perThousand" shape={<LaneDot />} isAnimationActive={false} />
        </ComposedChart>
      </ResponsiveContainer>
    </figure>
  );
}
