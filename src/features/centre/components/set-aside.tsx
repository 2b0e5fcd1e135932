import { useQuery } from '@tanstack/react-query';
import { ingestContracts } from '#shared/contracts/ingest.ts';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { setAsideText } from '#shared/text/en/ingest.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useChange } from '../mutations.ts';
import { setAsideQuery } from '../queries.ts';

type Named = { source: string; id: string };

/** Events that couldn't be taken as they came, each with its reason; applied again once the cause is mended. */
export function SetAside({ edits }: { edits: boolean }) {
  const { slug } = useCentre();
  const { dayAndTime } = useTimes();
  const list = useQuery(setAsideQuery(slug));
  const apply = useChange(slug, (events: Named[]) => call(ingestContracts.apply, { params: { centre: slug }, body: { events } }));
  const events = list.data?.events ?? [];
  const run = () => apply.mutate(events.map(({ source, id }) => ({ source, id })), { onSuccess: ({ applied, still }) => showToast(settingsWords.applied(applied, still.length)) });
  return (
    <section>
      <PartTitle note={events.length > 0 ? events.length : null}>{setAsideText.title}</PartTitle>
      {events.length === 0 ? (
        <p className="border-t border-rule py-2 text-dim">{list.error ? sentenceOf(list.error) : setAsideText.none}</p>
      ) : (
        <>
          <p className="type-label mb-2">{setAsideText.explain}</p>
          <ul className="max-h-80 overflow-y-auto">
            {events.map((event) => (
              <li key={`${event.source} ${event.id}`} className="border-t border-rule py-2">
                <p className="flex flex-wrap justify-between gap-x-4">
                  <b className="font-[620] break-all">{event.type}</b>
                  <span className="type-label">{dayAndTime(event.receivedAt)}</span>
                </p>
                <p className="text-sm">{event.says}</p>
                <p className="type-label break-all">{`${event.source} · ${event.id}`}</p>
              </li>
            ))}
          </ul>
          {edits ? <Button className="mt-2" busy={apply.isPending} onClick={run}>{settingsWords.applyAll(events.length)}</Button> : null}
        </>
      )}
      <Refused>{sentenceOf(apply.error)}</Refused>
    </section>
  );
}
