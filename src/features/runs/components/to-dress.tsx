import type { TonightView } from '#shared/contracts/runs.ts';
import { lanesText } from '#shared/text/en/formats.ts';
import { startByText, runsText as text } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { usePlanRun } from '../mutations.ts';

type Block = TonightView['blocks'][number];

/** Lanes that a session wants and no run has yet: who would dress them best, from when, and by when at the latest. */
export function ToDress({ block, machine, pattern }: { block: Block; machine: string; pattern: string }) {
  const { may } = useCentre();
  const { time } = useTimes();
  const plan = usePlanRun();
  const { startBy, breaksFirst, session } = block;
  const wanted = { machine: block.machine, pattern: block.pattern, lanes: block.lanes, startAt: block.startAt, ...(block.revision === null ? {} : { revision: block.revision }) };
  return (
    <li className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2 border-t border-rule py-3">
      <div className="min-w-0">
        <strong className="type-name">{session?.name}</strong>
        <p className="text-dim">{`${session ? `${text.warmUp} ${time(session.warmUpAt)} · ` : ''}${lanesText(block.lanes)} · ${pattern} · ${machine} ${time(block.startAt)}–${time(block.endAt)}`}</p>
        {startBy === null ? null : <p className="font-[620] text-amber">{startByText(time(startBy), breaksFirst)}</p>}
        {block.freeUnknown.length > 0 ? <p className="text-dim">{text.freeUnknown(block.freeUnknown)}</p> : null}
        <Refused>{sentenceOf(plan.error)}</Refused>
      </div>
      {may('run.record') ? <Button busy={plan.isPending} onClick={() => plan.mutate(wanted)}>{text.planThis}</Button> : null}
    </li>
  );
}
