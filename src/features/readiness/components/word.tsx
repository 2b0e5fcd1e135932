import type { SessionView } from '#shared/contracts/readiness.ts';
import { becauseSentence, confirmLabel } from '#shared/text/en/readiness.ts';
import { confirmedText, confirmedToast, readinessText as text, reopenedText } from '#shared/text/en/readiness-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useConfirm } from '../mutations.ts';

/** The secretary's word, or what is known of it. On a phone the buttons stand at the thumb. */
export function Word({ session, onRaise }: { session: SessionView; onRaise: () => void }) {
  const { may } = useCentre();
  const { time } = useTimes();
  const mine = may('readiness.confirm');
  const { confirmation } = session;
  return (
    <section>
      <PartTitle>{mine ? text.word : text.wordOfSecretary}</PartTitle>
      {confirmation ? <p className="font-[620]">{confirmedText(confirmation.by, confirmation.at, time)}</p> : null}
      {confirmation?.reopened ? (
        <p role="status" className="mt-1.5 border-l-4 border-amber-fill pl-3">
          <strong className="font-[700]">{reopenedText(confirmation.reopened.at, time)}</strong> {becauseSentence(confirmation.reopened.because, time)}
        </p>
      ) : null}
      {mine ? <p className="mt-1 text-sm text-dim">{text.wordMore}</p> : confirmation ? null : <p className="text-sm text-dim">{text.notConfirmed}</p>}
      {mine && !session.frozen ? <Buttons session={session} onRaise={onRaise} /> : null}
    </section>
  );
}

function Buttons({ session, onRaise }: { session: SessionView; onRaise: () => void }) {
  const confirm = useConfirm(session.id);
  const standing = session.confirmation !== null && session.confirmation.reopened === null;
  const holds = session.verdict === 'held' || session.verdict === null;
  return (
    <>
      <div className="mt-4 flex flex-col gap-3 max-[900px]:fixed max-[900px]:inset-x-0 max-[900px]:bottom-[calc(3.5rem+env(safe-area-inset-bottom))] max-[900px]:z-10 max-[900px]:mt-0 max-[900px]:border-t max-[900px]:border-rule max-[900px]:bg-card max-[900px]:px-4 max-[900px]:py-3">
        {holds && !standing ? <p id="why-not" className="text-sm font-[620]">{text.confirmFirst}</p> : null}
        <Refused>{sentenceOf(confirm.error)}</Refused>
        <div className="flex flex-row-reverse gap-3 min-[901px]:flex-col">
          {standing ? null : (
            <Button kind="primary" size="hand" className="grow px-3! whitespace-normal!" busy={confirm.isPending} disabled={holds || confirm.isPending} aria-describedby={holds ? 'why-not' : undefined} onClick={() => confirm.mutate(undefined, { onSuccess: () => showToast(confirmedToast(session.lanes)) })}>
              {confirmLabel(session.lanes)}
            </Button>
          )}
          <Button kind="secondary" size="hand" className="px-3! max-[900px]:grow" onClick={onRaise}>{text.raise}</Button>
        </div>
      </div>
      {/* What stands behind the buttons at the thumb must be reachable by scrolling. */}
      <div aria-hidden className="h-28 min-[901px]:hidden" />
    </>
  );
}
