import './floor.css';
import { lazy, Suspense, useEffect, useRef, useState } from 'react';
import { floorWords } from '#shared/text/en/floor-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { useMedia } from '../../lib/media.ts';
import { patient } from '../../lib/patient.ts';
import { Skeleton } from '../../ui/page.tsx';
import { useBoard } from './board-context.ts';
import { FloorKey } from './components/floor-key.tsx';
import { KeysHelp } from './components/keys-help.tsx';
import { NightLine } from './components/night-line.tsx';
import { Plan } from './components/plan.tsx';
import { Side } from './components/side.tsx';
import type { FloorProps } from './floor-props.ts';
import { useFloorKeys } from './use-floor-keys.ts';
import { type LaneMode, useLaneMode, useLaneSelection } from './use-lane-selection.ts';

/** What isn't there at first sight is fetched after it: the panel when the page rests, the turned plan on a phone. */
const panelCode = () => import('./components/lane-panel.tsx');
const LanePanel = lazy(() => patient(panelCode).then((m) => ({ default: m.LanePanel })));
const PhoneFloor = lazy(() => patient(() => import('./components/phone-floor.tsx')).then((m) => ({ default: m.PhoneFloor })));
const REST_MS = 2500;

/** Below this width the plan turns a quarter: lanes become rows. */
const TURNED = '(max-width: 899.98px)';

/** The house from above, live. */
export function FloorPage() {
  const turned = useMedia(TURNED);
  const centre = useBoard('centre');
  const { slug, may } = useCentre();
  const selection = useLaneSelection(centre?.lanes ?? 0);
  const [mode, setMode] = useLaneMode(selection.lane);
  const callAddress = may('call.see') ? (call: string) => `/${slug}/calls/${call}` : null;
  const sessionAddress = may('readiness.see') ? (session: string) => `/${slug}/readiness/${session}` : null;
  useEffect(() => {
    const timer = setTimeout(() => void panelCode().catch(() => undefined), REST_MS);
    return () => clearTimeout(timer);
  }, []);
  if (!centre) return <div className="p-6"><Skeleton lines={8} label={floorWords.loading} /></div>;
  const panel = selection.lane === null ? null : (
    <Suspense fallback={<Skeleton lines={5} label={floorWords.loading} />}>
      <LanePanel lane={selection.lane} mode={mode} onMode={setMode} onLeave={() => selection.select(null)} callAddress={callAddress} />
    </Suspense>
  );
  if (turned) {
    return (
      <Suspense fallback={<div className="p-4"><Skeleton lines={8} label={floorWords.loading} /></div>}>
        <PhoneFloor selection={selection} panel={panel} callAddress={callAddress} sessionAddress={sessionAddress} />
      </Suspense>
    );
  }
  return <Desk selection={selection} mode={mode} onMode={setMode} panel={panel} callAddress={callAddress} sessionAddress={sessionAddress} lanes={centre.lanes} />;
}

function Desk({ selection, mode, onMode, panel, callAddress, sessionAddress, lanes }: FloorProps & { mode: LaneMode; onMode: (mode: LaneMode) => void; lanes: number }) {
  const [help, setHelp] = useState(false);
  const field = useRef<HTMLInputElement>(null);
  useFloorKeys({ selection, mode, onMode, lanes, onHelp: () => setHelp(true), onSearch: () => field.current?.focus() });
  return (
    <div className="grid min-h-0 grow grid-cols-[minmax(0,1fr)_19.5rem] min-[1700px]:grid-cols-[minmax(0,1fr)_22rem]">
      <h1 className="sr-only">{floorWords.pageTitle}</h1>
      <div className="flex min-h-0 min-w-0 flex-col gap-3 px-6 pt-3 pb-2">
        <NightLine sessionAddress={sessionAddress} />
        <Plan selected={selection.lane} onSelect={selection.select} sessionAddress={sessionAddress} />
        <FloorKey typed={selection.typed} lanes={lanes} field={field} onLane={selection.select} onHelp={() => setHelp(true)} />
      </div>
      {/* eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- what scrolls must be reachable by keyboard (WCAG 2.1.1) */}
      <aside tabIndex={0} aria-label={panel ? floorWords.laneAside : floorWords.aside} className="overflow-y-auto border-l border-rule bg-card px-5 py-4">
        {panel ?? <Side addresses={{ call: callAddress, session: sessionAddress }} />}
      </aside>
      <KeysHelp open={help} onClose={() => setHelp(false)} />
    </div>
  );
}
