import { callText } from '#shared/text/en/calls-screen.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Banner } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import type { CallActions } from '../mutations.ts';
import { nameOf } from '../action-names.ts';

/** What was pressed and hasn't arrived, and what was refused; for one call, or for all. */
export function QueueNotes({ actions, call }: { actions: CallActions; call?: string }) {
  const about = (id: string) => call === undefined || call === id;
  const waiting = actions.away ? actions.waiting.filter((action) => about(action.call)) : [];
  return (
    <div className="flex flex-col gap-2 empty:hidden">
      {waiting.length > 0 ? (
        <Banner tone="plain" title={callText.queued(waiting.map(nameOf).join(', '))}>
          {callText.queuedMore}
        </Banner>
      ) : null}
      {actions.refused
        .filter((one) => about(one.action.call))
        .map(({ action, problem }) => (
          <Banner
            key={action.key}
            tone="amber"
            title={callText.notDone(nameOf(action), sentenceOf(problem) ?? '')}
            action={
              <Button kind="secondary" className="text-on-amber! ring-on-amber!" onClick={() => actions.dismiss(action.key)}>
                {callText.understood}
              </Button>
            }
          />
        ))}
    </div>
  );
}
