import { memo } from 'react';
import { capWords, laneSentence } from '#shared/text/en/floor.ts';
import { elapsed } from '#shared/text/en/formats.ts';
import { useNow } from '../../../lib/clock.ts';
import { Mark } from '../../../ui/marks.tsx';
import { useLane } from '../board-context.ts';
import { filmShare, type LaneMark, markOf, rigShare } from '../lane-mark.ts';
import { filmOpacity } from './boards.tsx';
import { Pins } from './pins.tsx';

const WORD: Partial<Record<LaneMark, string>> = {
  'mechanic-in': capWords.mechanicIn[1].replace('\n', ' '), 'out-of-service': capWords.out[1], 'parked': capWords.parked[0], 'off': capWords.off[0], 'stopped': capWords.stopped[1],
  'cause-missing': capWords.cause[0], 'unheard': capWords.unheard[0],
};
const TONE: Partial<Record<LaneMark, string>> = { 'unanswered': 'text-red', 'danger': 'text-red', 'answered': 'text-amber' };
const USUAL = 41 / 60;

/** One lane lying on its side: number, boards with film, pins, and what its machine says. The whole row is the target. */
export const LaneRow = memo(function LaneRow({ lane, selected, onSelect }: { lane: number; selected: boolean; onSelect: (lane: number) => void }) {
  const view = useLane(lane);
  const marked = view ? markOf(view) : null;
  const now = useNow(marked && (marked.since !== null || view?.dressing) ? 1000 : 30_000);
  if (!view || !marked) return null;
  const share = filmShare(view);
  const rig = view.dressing ? rigShare(view.dressing, now) : null;
  const counted = view.film && rig === null && (view.hearsDeliveries || view.film.deliveries > 0) ? view.film.deliveries : null;
  const { mark, since } = marked;
  return (
    <li className={lane % 2 === 0 ? 'mb-2' : 'mb-0'}>
      <button
        type="button"
        className="row-strip grid min-h-hand w-full grid-cols-[2.25rem_minmax(0,1fr)_2rem_4.25rem] items-center gap-x-1.5 text-left"
        aria-label={laneSentence(view, now)}
        aria-pressed={selected}
        data-lane={lane}
        data-mark={mark}
        data-use={view.use?.kind ?? 'free'}
        onClick={() => onSelect(lane)}
      >
        <b className={`type-number pr-1.5 text-right text-[1.3125rem] ${TONE[mark] ?? (view.use ? '' : 'font-[560] text-dim')}`}>{lane}</b>
        <span className="row-boards">
          {rig !== null ? <span className="row-film" style={{ width: `${rig * 100}%`, opacity: filmOpacity(1) }} /> : null}
          {rig === null && view.film && share !== null ? <span className="row-film" style={{ width: `${share * 100}%`, opacity: filmOpacity(view.film.strength) }} /> : null}
          {rig === null ? null : <span className="row-rig" style={{ left: `calc(${rig * 100}% - 10px)` }} />}
          {counted === null ? null : <span className="row-balls" style={{ left: `calc(${(share ?? USUAL) * 100}% + 6px)` }}>{counted}</span>}
          {view.brokenOff ? <span className="row-redo">{REDO}</span> : null}
        </span>
        <span className="row-deck">{view.machine === 'unknown' ? null : <Pins standing={view.pins} turned />}</span>
        <span className={`flex items-center gap-1 text-[0.9375rem] leading-none font-[720] [font-stretch:82%] ${TONE[mark] ?? 'text-dim'}`}>
          {mark === 'unanswered' || mark === 'danger' ? <Mark kind="unanswered" /> : null}
          {mark === 'answered' ? <Mark kind="answered" /> : null}
          {mark === 'mechanic-in' ? <span aria-hidden className="hatch h-4 w-3 shrink-0" /> : null}
          {mark === 'out-of-service' ? <Mark kind="out-of-service" size={12} /> : null}
          {since !== null && mark !== 'mechanic-in' ? elapsed(now - since) : WORD[mark]}
        </span>
      </button>
    </li>
  );
});
const REDO = capWords.redo;
