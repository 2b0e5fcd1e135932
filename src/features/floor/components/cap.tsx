import { memo } from 'react';
import { capWords } from '#shared/text/en/floor.ts';
import { canvasMeasure, fitWord, useFontReady } from '../../../lib/fit-text.ts';
import { Mark } from '../../../ui/marks.tsx';
import { capClock, type LaneMark } from '../lane-mark.ts';

interface Props {
  mark: LaneMark;
  since: number | null;
  /** Server time, epoch ms. */
  now: number;
  width: number;
  height: number;
}

const WORDS: Partial<Record<LaneMark, readonly string[]>> = {
  'mechanic-in': capWords.mechanicIn, 'out-of-service': capWords.out, 'parked': capWords.parked, 'off': capWords.off, 'stopped': capWords.stopped,
  'cause-missing': capWords.cause, 'unheard': capWords.unheard,
};
const GLYPH = { 'unanswered': 'unanswered', 'danger': 'unanswered', 'answered': 'answered', 'out-of-service': 'out-of-service', 'parked': 'parked' } as const;

/** The machine at the head of a lane: a short line at rest, else a mark with its clock or words. */
export const Cap = memo(function Cap({ mark, since, now, width, height }: Props) {
  useFontReady();
  const size = Math.min(34, Math.max(11.5, height * (height > 70 ? 0.4 : 0.29)));
  const glyph = mark in GLYPH ? GLYPH[mark as keyof typeof GLYPH] : null;
  const room = { width: width - 4, weight: 760 };
  const clock = since === null || mark === 'mechanic-in' ? null : fitWord([capClock(now - since)], { ...room, size }, canvasMeasure);
  const words = WORDS[mark];
  const wordSize = Math.min(22, Math.max(10.5, size * 0.86));
  const word = words ? fitWord(words, { ...room, size: wordSize, weight: 700 }, canvasMeasure) : null;
  return (
    <span className="cap">
      <span className="cap-in">
        {mark === 'running' ? <span className="rest" /> : null}
        {glyph ? <Mark kind={glyph} size={Math.round(Math.min(height * 0.4, width * 0.5))} /> : null}
        {clock ? (
          <span className="cap-clock" style={{ fontSize: size, fontStretch: `${clock.stretch}%` }}>
            {clock.word}
          </span>
        ) : null}
        {word && !clock ? (
          <span className="cap-words" style={{ fontSize: wordSize, fontStretch: `${word.stretch}%` }}>
            {word.word}
          </span>
        ) : null}
      </span>
    </span>
  );
});
