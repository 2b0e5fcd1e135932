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

const axis = { stroke: 'var(--rule)', tick: { fill: 'var(--dim)', fontSize: 13 } };

/** Lanes by frames and rate, over the band that chance allows. */
export function FunnelChart({ data }: { data: FunnelView }) {
  const limits = data.limits.map((l) => ({ frames: l.frames, band: [l.low95, l.high95], low998: l.low998, high998: l.high998 }));
  const lanes = data.lanes.filter((l) => l.perThousand !== null).sort((a, b) => Number(a.position !== 'inside') - Number(b.position !== 'inside'));
  const top = Math.ceil(Math.max(...limits.map((l) => l.high998), ...lanes.map((l) => l.perThousand ?? 0)));
  return (
    <figure role="img" aria-label={wording.funnelLabel(data.finding)} className="m-0 h-[min(56vh,34rem)] min-h-72 w-full">
      <ResponsiveContainer width="100%" height="100%">
        <ComposedChart margin={{ top: 12, right: 20, bottom: 34, left: 8 }} accessibilityLayer={false}>
          <CartesianGrid vertical={false} stroke="var(--rule)" />
          <XAxis type="number" dataKey="frames" domain={['dataMin', 'dataMax']} tickFormatter={(v: number) => number(v)} tickCount={6} {...axis} label={{ value: wording.axisFrames, position: 'bottom', offset: 12, fill: 'var(--dim)', fontSize: 13 }} />
          <YAxis type="number" domain={[0, top]} tickCount={6} allowDecimals width={34} {...axis} />
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
