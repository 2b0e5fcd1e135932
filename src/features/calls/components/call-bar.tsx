import { Button } from '../../../ui/button.tsx';
import { classes } from '../../../ui/class-names.ts';
import type { Offer, Offers } from '../offers.ts';

/** What comes next, in thumb's reach. */
export function CallBar({ offers, onPress, busy }: { offers: Offers; onPress: (offer: Offer) => void; busy: boolean }) {
  const { main, second } = offers;
  if (!main && !second) return null;
  return (
    <div className="sticky bottom-[calc(3.5rem+env(safe-area-inset-bottom))] z-10 -mx-4 border-t border-rule bg-paper px-4 pt-2 pb-3 min-[901px]:bottom-0 min-[901px]:mx-0 min-[901px]:px-0 min-[901px]:pb-5">
      {main?.because ? <p id="main-because" className="mb-1.5 font-[620]">{main.because}</p> : null}
      <div className={classes('grid gap-3', main && second ? 'grid-cols-[auto_minmax(0,1fr)]' : 'grid-cols-1')}>
        {second ? <Button kind="secondary" className="min-h-14! px-4! text-[1.0625rem]" disabled={busy} onClick={() => onPress(second)}>{second.label}</Button> : null}
        {main ? (
          <Button kind="primary" busy={busy} disabled={busy || main.because !== undefined} aria-describedby={main.because ? 'main-because' : undefined} className="min-h-14! text-[1.1875rem] whitespace-normal!" onClick={() => onPress(main)}>
            {main.label}
          </Button>
        ) : null}
      </div>
    </div>
  );
}

/** What is rarer, in the page itself: the thumb's place is kept for what comes next. */
export function RarerActions({ offers, onPress, busy }: { offers: readonly Offer[]; onPress: (offer: Offer) => void; busy: boolean }) {
  if (offers.length === 0) return null;
  return (
    <div className="mt-6 flex flex-wrap gap-2">
      {offers.map((offer) => (
        <Button key={offer.label} kind="secondary" size="hand" className="grow ring-line!" disabled={busy} onClick={() => onPress(offer)}>
          {offer.label}
        </Button>
      ))}
    </div>
  );
}
