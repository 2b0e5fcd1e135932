import type { SessionView } from '#shared/contracts/readiness.ts';
import { noneUntilText, offersTitle, offerText, offerTitle } from '#shared/text/en/readiness.ts';
import { askedText, concernToast, movedText, readinessText as text, takeMove } from '#shared/text/en/readiness-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useConcern, useMovePair } from '../mutations.ts';

type Offer = SessionView['offers']['offers'][number];

/** If a lane isn't back: where else, or how. The desk takes a move; a secretary asks for it. */
export function OffersPart({ session }: { session: SessionView }) {
  const { may } = useCentre();
  const { time } = useTimes();
  const { failing, offers, noneUntil } = session.offers;
  const move = useMovePair(session.id);
  const ask = useConcern(session.id);
  if (failing.length === 0) return null;
  const take = (offer: Offer) => {
    if (offer.kind === 'one-lane') return;
    move.mutate({ fromPair: offer.fromPair, toPair: offer.toPair }, { onSuccess: () => showToast(movedText(session.name, offer.toPair)) });
  };
  const wish = (offer: Offer) => ask.mutate({ text: askedText(offerTitle(offer)) }, { onSuccess: () => showToast(concernToast) });
  return (
    <section className="mb-8">
      <PartTitle>{offersTitle(failing)}</PartTitle>
      <ul>
        {offers.map((offer) => (
          <li key={offerTitle(offer)} className="border-t border-rule py-3">
            <h3 className="font-[680]">{offerTitle(offer)}</h3>
            <p className="mt-0.5 mb-2.5 text-sm text-dim">{offerText(offer, time)}</p>
            {may('readiness.settle') && offer.kind !== 'one-lane' ? <Button kind="secondary" busy={move.isPending} onClick={() => take(offer)}>{takeMove(offer.toPair)}</Button> : null}
            {may('readiness.confirm') ? <Button kind="secondary" busy={ask.isPending} onClick={() => wish(offer)}>{text.askDesk}</Button> : null}
          </li>
        ))}
      </ul>
      {noneUntil === null ? null : <p className="border-t border-rule pt-3 text-sm text-dim">{noneUntilText(noneUntil, time)}</p>}
      <Refused>{sentenceOf(move.error ?? ask.error)}</Refused>
    </section>
  );
}
