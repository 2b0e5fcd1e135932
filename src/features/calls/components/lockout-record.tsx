import { useState } from 'react';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { ISOLATION_STEPS, isolationRecorded, mayRecord, nothingRecorded, RELEASE_STEPS } from '#shared/domain/calls/lockout-steps.ts';
import { lockoutStepText } from '#shared/text/en/calls.ts';
import { lockoutText } from '#shared/text/en/calls-screen.ts';
import { useTimes } from '../../../lib/formats.ts';
import { Button } from '../../../ui/button.tsx';
import { classes } from '../../../ui/class-names.ts';
import type { ActionKind, QueuedAction } from '../action-queue.ts';

type Act = (kind: ActionKind, body?: QueuedAction['body']) => void;

/** Somebody reaches in: only then a record is asked for. It keeps the order of the steps; it isolates nothing. */
export function LockoutRecord({ call, mine, works, act }: { call: CallDetail; mine: boolean; works: boolean; act: Act }) {
  const { time } = useTimes();
  // Somebody thinks better of it half way: what was locked is given back by the release steps.
  const [thoughtBetter, setThoughtBetter] = useState(false);
  const record = call.lockout;
  const open = record !== null && record.releasedAt === null;
  if (!open && (!works || call.status === 'closed')) return null;
  const inside = open && isolationRecorded(record.steps);
  const releasing = open && (inside || thoughtBetter || RELEASE_STEPS.some((step) => record.steps[step] !== undefined));
  return (
    <section className="mt-2">
      <div className="mb-1 flex flex-wrap items-baseline justify-between gap-x-3">
        <h2 className="type-name text-lg">{releasing ? lockoutText.release : lockoutText.title}</h2>
        <span className="type-label">{releasing ? lockoutText.releasePhases : lockoutText.phases}</span>
      </div>
      {inside && record.inMachineSince !== null ? <p className="hatch my-2 rounded-sm p-1.5"><span className="block bg-cap px-2.5 py-1.5 font-[700] text-pin">{lockoutText.inside(record.by, time(record.inMachineSince))}</span></p> : null}
      {open && !mine ? <p className="py-1 text-dim">{lockoutText.own(record.by)}</p> : null}
      {open ? <StepList call={call} steps={releasing ? RELEASE_STEPS : ISOLATION_STEPS.map((step) => step.code)} done={record.steps} enabled={mine} act={act} /> : null}
      <p className="mt-2 font-[650] text-amber">{lockoutText.record}</p>
      <p className="text-sm text-dim">{lockoutText.procedure}</p>
      {open ? null : (
        <Button kind="secondary" size="hand" className="mt-3 w-full" onClick={() => act('lockoutBegin')}>
          {lockoutText.begin}
        </Button>
      )}
      {open && mine && (!releasing || nothingRecorded(record.steps)) ? (
        <Button kind="quiet" size="hand" className="mt-1 w-full" onClick={() => (nothingRecorded(record.steps) ? act('lockoutRelease') : setThoughtBetter(true))}>
          {lockoutText.drop}
        </Button>
      ) : null}
      {open && mine && inside ? <Recorded call={call} done={record.steps} /> : null}
    </section>
  );
}

function StepList({ call, steps, done, enabled, act }: { call: CallDetail; steps: readonly string[]; done: Record<string, number>; enabled: boolean; act: Act }) {
  const { time } = useTimes();
  return (
    <ul className="border-t border-rule">
      {steps.map((step) => {
        const at = done[step];
        const ticked = at !== undefined;
        const off = !enabled || !mayRecord(step, !ticked, done).ok;
        return (
          <li key={step} className="border-b border-rule">
            <button
              type="button"
              role="checkbox"
              aria-checked={ticked}
              aria-disabled={off || undefined}
              onClick={() => (off ? undefined : act('lockoutStep', { step, done: !ticked }))}
              className={classes('grid min-h-[3.25rem] w-full scroll-mt-20 scroll-mb-56 grid-cols-[auto_minmax(0,1fr)_auto] items-center gap-3 py-1 text-left text-[1.0625rem] font-[620]', off && !ticked && 'cursor-default text-dim')}
            >
              <span aria-hidden className={classes('grid size-8 place-items-center rounded-md text-xl', ticked ? 'bg-ink text-paper' : 'ring-2 ring-inset', !ticked && (off ? 'ring-line' : 'ring-ink'))}>
                {ticked ? '✓' : ''}
              </span>
              <span>{lockoutStepText(step, call.family)}</span>
              <span className="text-sm font-[500] text-dim">{ticked ? time(at) : ''}</span>
            </button>
          </li>
        );
      })}
    </ul>
  );
}

/** The list before reaching in, as it was ticked; closed, as it may not change any more. */
function Recorded({ call, done }: { call: CallDetail; done: Record<string, number> }) {
  const { time } = useTimes();
  return (
    <details className="mt-3">
      <summary className="cursor-pointer py-3.5 font-[620]">{lockoutText.before}</summary>
      <ul>
        {ISOLATION_STEPS.map((step) => (
          <li key={step.code} className="flex justify-between gap-3 border-t border-rule py-2">
            <span>{lockoutStepText(step.code, call.family)}</span>
            <span className="text-dim">{time(done[step.code] ?? 0)}</span>
          </li>
        ))}
      </ul>
    </details>
  );
}
