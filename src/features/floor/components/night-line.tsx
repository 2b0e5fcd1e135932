import { Link } from 'react-router-dom';
import { floorWords } from '#shared/text/en/floor-page.ts';
import { runSentence, sessionSentence } from '#shared/text/en/floor.ts';
import { timeOfDay } from '#shared/text/en/formats.ts';
import { useNow } from '../../../lib/clock.ts';
import { canvasMeasure, useFontReady } from '../../../lib/fit-text.ts';
import { useBoard } from '../board-context.ts';
import { hourTicks, layoutNight, type NightItem } from '../night-line.ts';
import { useSize } from '../use-size.ts';

const HEAD = 20;
const MINUTE = 60_000;
const LABEL = { size: 12, weight: 600, stretch: 87.5 } as const;

/** Sessions and runs of the night on one clock, in the centre's own time. Rows get lower when there are many. */
export function NightLine({ sessionAddress }: { sessionAddress: ((session: string) => string) | null }) {
  const fontReady = useFontReady();
  const [ref, size] = useSize();
  const now = Math.floor(useNow(15_000) / MINUTE) * MINUTE;
  const sessions = useBoard('sessions');
  const runs = useBoard('runs');
  const zone = useBoard('centre')?.zone;
  if (!zone || !size) return <div ref={ref} className="h-28 shrink-0" />;
  const night = layoutNight(sessions ?? [], runs ?? [], now, size.width, (text) => (fontReady ? canvasMeasure(text, LABEL) : text.length * LABEL.size * 0.62));
  const pitch = night.rows > 4 ? 18 : 23;
  const nowX = Math.round(((now - night.from) / (night.to - night.from)) * size.width);
  const nowText = timeOfDay(now, zone);
  return (
    <section ref={ref} aria-label={floorWords.night} className="relative shrink-0" style={{ height: HEAD + Math.max(2, night.rows) * pitch + 4 }}>
      {hourTicks(night.from, night.to, size.width, (at) => Number(timeOfDay(at, zone).slice(3))).map((tick) => (
        <div key={tick.at} aria-hidden className="absolute inset-y-0 border-l border-rule" style={{ left: tick.x }}>
          {Math.abs(tick.x - nowX) < 48 || tick.x > size.width - 40 ? null : <span className="absolute top-0 left-1 text-[0.71875rem] leading-4 text-dim [font-stretch:88%]">{timeOfDay(tick.at, zone)}</span>}
        </div>
      ))}
      <div aria-hidden className="absolute inset-y-0 border-l-2 border-ink" style={{ left: nowX }}>
        <b className="type-clock absolute top-0 -left-px rounded-r-[3px] bg-ink px-1.5 text-[0.75rem] leading-[17px] text-paper">{nowText}</b>
      </div>
      <ul>
        {night.items.map((item) => (
          <li key={item.key}>
            <Item item={item} top={HEAD + item.row * pitch} height={pitch - 4} zone={zone} address={sessionAddress && item.session ? sessionAddress(item.session.id) : null} />
          </li>
        ))}
      </ul>
    </section>
  );
}

function Item({ item, top, height, zone, address }: { item: NightItem; top: number; height: number; zone: string; address: string | null }) {
  const sentence = item.session ? sessionSentence(item.session, zone) : item.run ? runSentence(item.run, zone) : '';
  const bar = { className: 'night-bar', 'data-look': item.look, title: sentence, style: { left: item.x, width: item.width, top, height } };
  const label = item.label ? (
    <span
      aria-hidden
      className={`pointer-events-none absolute whitespace-nowrap ${item.label.inside ? '' : 'bg-paper px-1'}`}
      style={{ left: item.label.inside ? 7 : item.label.x - item.x + 3, fontSize: LABEL.size, fontWeight: LABEL.weight, fontStretch: `${LABEL.stretch}%`, lineHeight: `${height}px`, color: item.label.inside ? undefined : 'var(--dim)' }}
    >
      {item.label.text}
    </span>
  ) : null;
  return (
    <>
      {item.warmUp > 0 ? <span aria-hidden className="night-warm" style={{ left: item.x - item.warmUp, width: item.warmUp - 1, top, height }} /> : null}
      {address ? (
        <Link to={address} aria-label={sentence} {...bar}>
          {label}
        </Link>
      ) : (
        <span role="img" aria-label={sentence} {...bar}>
          {label}
        </span>
      )}
    </>
  );
}
