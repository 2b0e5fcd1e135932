import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { causeText as nameOfCause } from '#shared/text/en/calls-causes.ts';
import { callText } from '#shared/text/en/calls-screen.ts';
import { Problem } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';
import { useTimes } from '../../lib/formats.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Page, Skeleton } from '../../ui/page.tsx';
import type { QueuedAction } from './action-queue.ts';
import { CallBar, RarerActions } from './components/call-bar.tsx';
import { CallFactsPart, CallLife, Cautions } from './components/call-facts.tsx';
import { CallHead } from './components/call-head.tsx';
import { CauseSheet } from './components/cause-sheet.tsx';
import { LockoutRecord } from './components/lockout-record.tsx';
import { QueueNotes } from './components/queue-notes.tsx';
import { LeftBehindSheet, ParkSheet, ServiceSheet } from './components/reason-sheets.tsx';
import { useCallActions } from './mutations.ts';
import { type Offer, offersFor, type SheetName } from './offers.ts';
import { callQuery } from './queries.ts';
import { withQueued } from './queued.ts';

/** One call, made for a phone in a greasy hand: lane, what, how long; then what comes next at the thumb. */
export function CallPage() {
  const { slug } = useCentre();
  const { call: id = '' } = useParams();
  const { data, error, refetch } = useQuery(callQuery(slug, id));
  if (data) return <CallScreen key={data.id} shown={data} />;
  const gone = error instanceof Problem && [404, 422].includes(error.status);
  return (
    <Page title={error ? (gone ? callText.unknown : callText.failed) : callText.loading} lead={gone ? callText.unknownMore : sentenceOf(error)}>
      {error ? (
        <div className="flex gap-3">
          <Link className={buttonLook({ kind: 'secondary' })} to={`/${slug}/calls`}>{callText.back}</Link>
          {gone ? null : <Button onClick={() => void refetch()}>{callText.retry}</Button>}
        </div>
      ) : (
        <Skeleton lines={6} label={callText.loading} />
      )}
    </Page>
  );
}

function CallScreen({ shown }: { shown: CallDetail }) {
  const { slug, me, may, role } = useCentre();
  const actions = useCallActions();
  const [sheet, setSheet] = useState<SheetName | null>(null);
  const queued = actions.waiting.filter((action) => action.call === shown.id);
  const call = me ? withQueued(shown, queued, me) : shown;
  const busy = queued.length > 0 && !actions.away;
  const works = may('call.work');
  const offers = offersFor(call, { id: me?.id ?? null, works, answers: may('call.answer'), manages: role === 'manager' });
  const act = (kind: QueuedAction['kind'], body: QueuedAction['body'] = null) => actions.act(shown.id, kind, body);
  const close = () => setSheet(null);
  const settle = (kind: QueuedAction['kind'], body: QueuedAction['body']) => {
    act(kind, body);
    close();
  };
  const press = ({ does }: Offer) => ('act' in does ? act(does.act) : setSheet(does.open));
  return (
    <div className="grid grow min-[901px]:grid-cols-[minmax(0,1fr)_min(26rem,34vw)]">
      <article className="flex min-w-0 flex-col px-4 pt-2 min-[901px]:mx-auto min-[901px]:w-full min-[901px]:max-w-2xl min-[901px]:pt-5">
        <Link to={`/${slug}/calls`} className="inline-flex min-h-hand items-center self-start pr-4 font-[620] text-dim underline decoration-rule underline-offset-4">{callText.back}</Link>
        <QueueNotes actions={actions} call={shown.id} />
        <CallHead call={call} queued={queued.length > 0} />
        <Closed call={shown} />
        <CallFactsPart call={call} />
        <Cautions call={call} />
        <LockoutRecord call={call} mine={call.lockout?.byId === me?.id} works={works} act={act} />
        <RarerActions offers={offers.more} onPress={press} busy={busy} />
        <div className="mt-8 pb-6 min-[901px]:hidden">
          <CallLife call={call} />
        </div>
        <div className="grow" />
        <CallBar offers={offers} onPress={press} busy={busy} />
      </article>
      <aside className="border-l border-rule bg-card px-6 py-6 max-[900px]:hidden">
        <CallLife call={call} />
      </aside>
      <CauseSheet
        call={call}
        open={sheet === 'cause'}
        onClose={close}
        onDone={(cause, note) => settle(call.status === 'out-of-service' ? 'backInService' : 'clear', { ...(cause ? { cause } : {}), ...(note ? { note } : {}) })}
      />
      <ServiceSheet call={call} open={sheet === 'service'} onClose={close} onDone={(reason) => settle('outOfService', { reason })} />
      <ParkSheet open={sheet === 'park'} onClose={close} onDone={(reason, until) => settle('park', { reason, until })} />
      <LeftBehindSheet open={sheet === 'left-behind'} onClose={close} onDone={(procedure) => settle('lockoutLeftBehind', { procedure })} />
    </div>
  );
}

function Closed({ call }: { call: CallDetail }) {
  const { dayAndTime } = useTimes();
  if (call.status !== 'closed' || !call.cleared) return null;
  const { cause, by, at, note } = call.cleared;
  return (
    <p className="border-b border-rule py-3 text-[1.0625rem]">
      {callText.closed(cause ? nameOfCause(cause) : null, by || null, dayAndTime(at))}
      {note ? <span className="block">{note}</span> : null}
    </p>
  );
}
