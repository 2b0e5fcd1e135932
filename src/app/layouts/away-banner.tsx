import { appText } from '#shared/text/en/app.ts';
import { useTimes } from '../../lib/formats.ts';
import { useLiveness } from '../../lib/live.ts';
import { Banner } from '../../ui/banner.tsx';

/** Over ten seconds without a good word: says so across the page, and as of when the rest is. */
export function AwayBanner() {
  const { state, since, database } = useLiveness();
  const { timeWithSeconds } = useTimes();
  if (state !== 'stale') return null;
  const base = database === 'away';
  return (
    <Banner tone="amber" title={base ? appText.databaseAway : appText.serverAway}>
      {base ? appText.databaseAwayMore : appText.serverAwayMore} {since === null ? appText.noNewsYet : appText.shownAsOf(timeWithSeconds(since))}
    </Banner>
  );
}
