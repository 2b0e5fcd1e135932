import './floor.css';
import { useRef, useState } from 'react';
import { floorWords } from '#shared/text/en/floor-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { useKeys } from '../../lib/keyboard.ts';
import { useMedia } from '../../lib/media.ts';
import { Skeleton } from '../../ui/page.tsx';
import { useBoard, useLane } from './board-context.ts';
import { FloorKey } from './components/floor-key.tsx';
import { KeysHelp } from './components/keys-help.tsx';
import type { LaneMode } from './components/lane-acts.tsx';
import { LanePanel, useLaneMode } from './components/lane-panel.tsx';
import { NightLine } from './components/night-line.tsx';
import { PhoneFloor } from './components/phone-floor.tsx';
import { Plan } from './components/plan.tsx';
import { Side } from './components/side.tsx';
import { useLaneAct } from './mutations.ts';
import { type Selection, useLaneSelection } from './use-lane-selection.ts';

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
  if (!centre) return <div className="p-6"><Skeleton lines={8} label={floorWords.loading} /></div>;
  const panel = selection.lane === null ? null : <LanePanel lane={selection.lane} mode={mode} onMode={setMode} onLeave={() => selection.select(null)} callAddress={callAddress} />;
  if (turned) return <PhoneFloor selection={selection} panel={panel} callAddress={callAddress} sessionAddress={sessionAddress} />;
  return <Desk selection={selection} mode={mode} onMode={setMode} panel={panel} callAddress={callAddress} sessionAddress={sessionAddress} lanes={centre.lanes} />;
}

export interface FloorProps {
  selection: Selection;
  panel: React.ReactNode;
  callAddress: ((call: string) => string) | null;
  sessionAddress: ((session: string) => string) | null;
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
      <aside aria-label={panel ? floorWords.laneAside : floorWords.aside} className="overflow-y-auto border-l border-rule bg-card px-5 py-4">
        {panel ?? <Side addresses={{ call: callAddress, session: sessionAddress }} />}
      </aside>
      <KeysHelp open={help} onClose={() => setHelp(false)} />
    </div>
  );
}

interface KeysInput {
  selection: Selection;
  mode: LaneMode;
  onMode: (mode: LaneMode) => void;
  lanes: number;
  onHelp: () => void;
  onSearch: () => void;
}

function useFloorKeys({ selection, mode, onMode, lanes, onHelp, onSearch }: KeysInput): void {
  const { slug, may } = useCentre();
  const view = useLane(selection.lane ?? 0);
  const act = useLaneAct(slug);
  const step = (by: number): boolean => {
    const next = (selection.lane ?? 0) + by;
    if (selection.lane !== null && next >= 1 && next <= lanes) selection.select(next);
    return selection.lane !== null;
  };
  const leave = (): boolean => {
    const lane = selection.lane;
    if (lane === null) return false;
    if (mode !== 'none') onMode('none');
    else {
      selection.select(null);
      document.querySelector<HTMLElement>(`.strip[data-lane="${lane}"]`)?.focus({ preventScroll: true });
    }
    return true;
  };
  const onLane = (next: LaneMode, allowed: boolean): boolean => {
    if (view && allowed) onMode(next);
    return view !== null;
  };
  useKeys((key) => {
    if (selection.type(key)) return true;
    switch (key) {
      case 'Escape': return leave();
      case '?': onHelp(); return true;
      case '/': onSearch(); return true;
      case 'ArrowLeft': return step(-1);
      case 'ArrowRight': return step(1);
      case 'c': return onLane('call', may('call.raise'));
      case 'm': return onLane('move', may('lane.operate') && view?.use !== null);
      case 'o':
        if (view?.use && may('lane.operate')) act.mutate({ act: 'close', lane: view.lane, was: view.use });
        return view?.use ? true : onLane('open', may('lane.operate'));
      default: return false;
    }
  });
}
