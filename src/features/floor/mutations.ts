import { useMutation } from '@tanstack/react-query';
import { callContracts } from '#shared/contracts/calls.ts';
import type { BodyOf } from '#shared/contracts/contract.ts';
import { floorContracts, type LaneView } from '#shared/contracts/floor.ts';
import { type Equipment, neighbourOf, pairOf, type SafetyKind } from '#shared/domain/equipment.ts';
import { equipmentNames, safetyNames } from '#shared/text/en/calls.ts';
import { lanesText } from '#shared/text/en/formats.ts';
import { laneWords } from '#shared/text/en/floor-page.ts';
import { call, newKey } from '../../lib/api.ts';
import { showToast } from '../../ui/toast.tsx';

export type LaneAct =
  | { act: 'open'; lane: number; body: BodyOf<typeof floorContracts.open> }
  | { act: 'close'; lane: number; was: LaneView['use'] }
  | { act: 'move'; lane: number; to: number }
  | { act: 'raise'; lane: number; equipment: Equipment }
  | { act: 'safety'; lane: number; kind: SafetyKind }
  | { act: 'out'; lane: number; reason: string }
  | { act: 'back'; lane: number }
  | { act: 'mine'; lane: number; call: string };

/** What a danger is about; it makes no difference to what stops. */
const ABOUT: Record<SafetyKind, Equipment> = { 'wet-approach': 'approach', 'ball-on-lane': 'lane-surface', 'person-in-pit': 'pinsetter', 'smoke': 'pinsetter', 'other-danger': 'lane-surface' };

async function send(centre: string, act: LaneAct): Promise<void> {
  const params = { centre, lane: act.lane };
  const idempotencyKey = newKey();
  switch (act.act) {
    case 'open': await call(floorContracts.open, { params, body: act.body, idempotencyKey }); return;
    case 'close': await call(floorContracts.close, { params, idempotencyKey }); return;
    case 'move': await call(floorContracts.move, { params, body: { to: act.to }, idempotencyKey }); return;
    case 'out': await call(floorContracts.outOfService, { params, body: { reason: act.reason }, idempotencyKey }); return;
    case 'back': await call(floorContracts.backInService, { params, idempotencyKey }); return;
    case 'raise': await call(callContracts.raise, { params: { centre }, body: { lane: act.lane, equipment: act.equipment }, idempotencyKey }); return;
    case 'safety': await call(callContracts.raise, { params: { centre }, body: { lane: act.lane, equipment: ABOUT[act.kind], safety: act.kind }, idempotencyKey }); return;
    case 'mine': await call(callContracts.acknowledge, { params: { centre, call: act.call }, idempotencyKey });
  }
}

function doneText(act: LaneAct): string {
  const { done } = laneWords;
  switch (act.act) {
    case 'open': return done.opened(act.lane);
    case 'close': return done.closed(act.lane);
    case 'move': return done.moved(act.lane, act.to);
    case 'out': return done.out(act.lane);
    case 'back': return done.back(act.lane);
    case 'raise': return done.raised(act.lane, equipmentNames[act.equipment]);
    case 'safety': return `${done.stopped(lanesText([pairOf(act.lane), neighbourOf(pairOf(act.lane))]))} ${safetyNames[act.kind]}.`;
    case 'mine': return done.mine(act.lane);
  }
}

/** What puts things back; null where an act has no counter-act (a call is cleared by a mechanic, with its cause). */
export function counterAct(act: LaneAct): LaneAct | null {
  switch (act.act) {
    case 'open': return { act: 'close', lane: act.lane, was: null };
    case 'close': {
      if (!act.was) return null;
      const { kind, label, bowlers, until, games } = act.was;
      return { act: 'open', lane: act.lane, body: { use: kind, label: label ?? undefined, bowlers: bowlers ?? undefined, until: until ?? undefined, games: games ?? undefined } };
    }
    case 'move': return { act: 'move', lane: act.to, to: act.lane };
    case 'out': return { act: 'back', lane: act.lane };
    case 'back': case 'raise': case 'safety': case 'mine': return null;
  }
}

/** Does something on a lane and says so with an undo. The floor itself changes by the next delta, never by the answer. */
export function useLaneAct(centre: string) {
  return useMutation({
    mutationFn: (act: LaneAct) => send(centre, act),
    onSuccess: (_, act) => {
      const back = counterAct(act);
      showToast(doneText(act), back ? () => void undo(centre, back) : undefined);
    },
  });
}

async function undo(centre: string, act: LaneAct): Promise<void> {
  try {
    await send(centre, act);
    showToast(doneText(act));
  } catch (error) {
    const { sentenceOf } = await import('../../lib/refusal.ts');
    showToast(sentenceOf(error) ?? '');
  }
}
