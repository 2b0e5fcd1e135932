import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import type { CallView } from '#shared/contracts/floor.ts';
import { callLanes, callTitle } from '#shared/text/en/calls.ts';
import { alertText } from '#shared/text/en/calls-screen.ts';
import { useCentre } from '../../../lib/centre.ts';
import { serverNow } from '../../../lib/clock.ts';
import { type Alert, alertsFor } from '../alerts.ts';
import { callsQuery } from '../queries.ts';
import { ring, wakeSound } from '../sound.ts';
import { Alarm } from './alarm.tsx';

const MINUTE = 60_000;
/** Escalation moves without an event: while somebody waits the list is asked for again. */
const WAITING_MS = 15_000;

/** Stands once in the layout: hears of new, unanswered and alarming calls wherever the person is, and shows the alarm over everything. */
export function CallAlerts() {
  const { slug, role, me, may } = useCentre();
  const { data } = useQuery({
    ...callsQuery(slug),
    enabled: may('call.see'),
    refetchInterval: (query) => (query.state.data?.open.some((call) => call.status === 'unanswered') ? WAITING_MS : false),
  });
  const known = useRef<readonly CallView[] | null>(null);
  useEffect(() => {
    const wake = () => wakeSound();
    window.addEventListener('pointerdown', wake);
    return () => window.removeEventListener('pointerdown', wake);
  }, []);
  useEffect(() => {
    if (!data) return;
    for (const alert of alertsFor(known.current, data.open, role)) tell(alert);
    known.current = data.open;
  }, [data, role]);
  const alarmed = data?.open.filter((call) => call.alarmAt !== null && call.mechanicIn) ?? [];
  return <Alarm calls={alarmed} me={me?.name ?? null} />;
}

function tell({ call, why }: Alert): void {
  ring(why);
  if (!('Notification' in window) || Notification.permission !== 'granted') return;
  const minutes = Math.floor((serverNow() - call.receivedAt) / MINUTE);
  const text = why === 'still' ? alertText.still(callTitle(call), callLanes(call), minutes) : alertText.newCall(callTitle(call), callLanes(call));
  try {
    // One notice a call: a later one replaces it.
    new Notification(text, { tag: call.id, requireInteraction: why === 'alarm' });
  } catch {
    // Some phones allow notices from a service worker only; the sound and the screen remain.
  }
}
