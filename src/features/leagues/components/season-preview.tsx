import { seasonOf, type SeasonRule } from '#shared/domain/leagues/season.ts';
import { leaguesText as text, nightLabel, nightNote, nightsText, skipLabel } from '#shared/text/en/leagues-page.ts';
import { refusalSentence } from '#shared/text/en/refusals.ts';
import { PartTitle } from '../../../ui/page.tsx';

/** Every night that the form would make, with the changes of the clocks; a tick away is a skip week. */
export function SeasonPreview({ rule, onSkip }: { rule: SeasonRule; onSkip: (dates: string[]) => void }) {
  const whole = seasonOf({ ...rule, skipDates: [] });
  const season = seasonOf(rule);
  const skipped = new Set(rule.skipDates);
  const missing = season.ok || season.code !== 'league.start-in-missing-hour' ? null : season.date;
  const dates = whole.ok ? whole.nights : nightsWithout(rule);
  const turn = (date: string) => onSkip(skipped.has(date) ? rule.skipDates.filter((one) => one !== date) : [...rule.skipDates, date].sort());
  return (
    <section>
      <PartTitle note={season.ok ? nightsText(season.nights.length) : undefined}>{text.season}</PartTitle>
      {season.ok ? <p className="mb-2 text-sm text-dim">{text.previewLead}</p> : <p role="status" className="mb-2 font-[620] text-red">{refusalSentence(season.code, { date: season.date })}</p>}
      <ul>
        {[...dates, ...(missing && !dates.some((night) => night.date === missing) ? [{ date: missing, clockChange: 0, repeated: false }] : [])].sort((a, b) => a.date.localeCompare(b.date)).map((night) => (
          <li key={night.date} className="border-t border-rule">
            <label className="flex min-h-9 cursor-pointer items-center gap-2.5 py-1 max-[900px]:min-h-hand">
              <input type="checkbox" className="size-5 shrink-0 accent-ink" aria-label={skipLabel(night.date)} checked={!skipped.has(night.date)} onChange={() => turn(night.date)} />
              <span className={skipped.has(night.date) ? 'text-dim line-through' : undefined}>{nightLabel(night.date)}</span>
              {nightNote(night) && !skipped.has(night.date) ? <span className="type-label">{nightNote(night)}</span> : null}
            </label>
          </li>
        ))}
      </ul>
    </section>
  );
}

/** A night in the missing hour spoils the whole season until it is skipped: shown with it skipped. */
function nightsWithout(rule: SeasonRule): { date: string; clockChange: number; repeated: boolean }[] {
  let skipDates: string[] = [];
  for (;;) {
    const season = seasonOf({ ...rule, skipDates });
    if (season.ok) return [...season.nights, ...skipDates.map((date) => ({ date, clockChange: 0, repeated: false }))];
    if (season.code !== 'league.start-in-missing-hour' || skipDates.includes(season.date)) return [];
    skipDates = [...skipDates, season.date];
  }
}
