import { useQuery } from '@tanstack/react-query';
import { accountText as text } from '#shared/text/en/accounts.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { PartTitle, Skeleton } from '../../../ui/page.tsx';
import { useEndSession } from '../mutations.ts';
import { ownSessionsQuery } from '../queries.ts';

/** Every browser in which one is signed in, and the way to end it there. */
export function SignIns() {
  const { dayAndTime } = useTimes();
  const { data, error } = useQuery(ownSessionsQuery);
  const end = useEndSession();
  return (
    <section className="min-w-0">
      <PartTitle>{text.signIns}</PartTitle>
      {data ? (
        <ul className="border-b border-rule">
          {data.sessions.map((one) => (
            <li key={one.id} className="flex items-start justify-between gap-4 border-t border-rule py-3">
              <div className="min-w-0">
                <strong className="font-[650] wrap-anywhere">{text.browser(one)}</strong>
                <p className="text-dim">{[one.address, text.since(dayAndTime(one.createdAt)), text.seen(dayAndTime(one.seenAt))].join(' · ')}</p>
              </div>
              {one.current ? <span className="type-label shrink-0 pt-1">{text.here}</span> : <Button onClick={() => end.mutate(one.id)} busy={end.isPending && end.variables === one.id}>{text.end}</Button>}
            </li>
          ))}
        </ul>
      ) : error ? <p className="border-t border-rule pt-3">{sentenceOf(error)}</p> : <Skeleton lines={3} label={text.loading} />}
      <Refused>{sentenceOf(end.error)}</Refused>
    </section>
  );
}
