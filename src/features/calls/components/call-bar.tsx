import { Button } from '../../../ui/button.tsx';
import { classes } from '../../../ui/class-names.ts';
import type { Offer, Offers } from '../offers.ts';

/** What comes next, in thumb's reach; what is rarer stands above it. */
export function CallBar({ offers, onPress, busy }: { offers: Offers; onPress: (offer: Offer) => void; busy: boolean }) {
  const { main, second, more } = offers;
  if (!main && !second && more.length === 0) return null;
  return (
    <div className="sticky bottom-0 z-10 -mx-4 border-t border-rule bg-paper px-4 pt-2 pb-[max(0.75rem,env(safe-area-inset-bottom))] min-[901px]:mx-0 min-[901px]:px-0">
      {more.length > 0 ? (
        <div className="mb-1 flex flex-wrap gap-x-2">
          {more.map((offer) => (
            <Button key={offer.label} kind="quiet" size="hand" className="px-2.5!" disabled={busy} onClick={() => onPress(offer)}>{offer.label}</Button>
          ))}
        </div>
      ) : null}
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
