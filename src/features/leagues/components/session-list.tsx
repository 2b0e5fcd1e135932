import type { BookingView } from '#shared/contracts/leagues.ts';
import { cancelLabel, cancelledToast, leaguesText as text, nightLabel, sessionLanes } from '#shared/text/en/leagues-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { serverNow } from '../../../lib/clock.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { classes } from '../../../ui/class-names.ts';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useCancelSession } from '../mutations.ts';

/** The season as it stands: what is set by hand or cancelled is said. */
export function SessionList({ sessions }: { sessions: readonly BookingView[] }) {
  const { may } = useCentre();
  const { time } = useTimes();
  const cancel = useCancelSession();
  const now = serverNow();
  return (
    <section className="mt-10 max-w-2xl">
      <PartTitle>{text.sessions}</PartTitle>
      <Refused>{sentenceOf(cancel.error)}</Refused>
      <ul>
        {sessions.map((session) => {
          const gone = session.status === 'cancelled';
          return (
            <li key={session.id} className="flex min-h-11 flex-wrap items-center gap-x-4 gap-y-1 border-t border-rule py-1.5">
              <span className={classes('w-28 font-[620]', gone && 'text-dim line-through')}>{nightLabel(session.date)}</span>
              <span className="grow text-dim">{`${time(session.startAt)} · ${sessionLanes(session.lanes)}`}</span>
              {gone || session.changed ? <span className="type-label">{gone ? text.cancelled : text.byHand}</span> : null}
              {!gone && session.warmUpAt > now && may('league.edit') ? (
                <Button kind="quiet" aria-label={cancelLabel(session.date)} disabled={cancel.isPending} onClick={() => cancel.mutate(session.id, { onSuccess: () => showToast(cancelledToast(session.date)) })}>{text.cancel}</Button>
              ) : null}
            </li>
          );
        })}
      </ul>
    </section>
  );
}
