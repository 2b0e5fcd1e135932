import type { RevisionBody } from '#shared/contracts/runs.ts';
import { formatBoard, parseBoard } from '#shared/domain/runs/pattern.ts';

/** A pass as it is typed. */
export interface PassDraft {
  direction: 'outbound' | 'return';
  from: string;
  to: string;
  loads: string;
  ul: string;
  product: 'A' | 'B';
  fromFt: string;
  toFt: string;
  /** What the table doesn't ask for and a new revision keeps. */
  kept: { speed?: number; rpm?: number };
}

export const NEW_PASS: PassDraft = { direction: 'outbound', from: '2L', to: '2R', loads: '1', ul: '50', product: 'A', fromFt: '0', toFt: '10', kept: {} };

export const draftOf = (body: RevisionBody): PassDraft[] => body.passes.map((p) => ({
  direction: p.direction, from: formatBoard(p.fromBoard), to: formatBoard(p.toBoard), loads: String(p.loads), ul: String(p.ul), product: p.product, fromFt: String(p.fromFt), toFt: String(p.toFt),
  kept: { speed: p.speed, rpm: p.rpm },
}));

/** A board that can't be read becomes board 0, which the rules refuse beside its field. */
const boardOf = (text: string) => parseBoard(text) ?? { side: 'L' as const, n: 0 };
const numberOf = (text: string): number => (text.trim() === '' ? Number.NaN : Number(text));
/** What isn't a number is sent as one that the rules refuse. */
const orRefused = (value: number): number => (Number.isFinite(value) ? value : -1000);
const whole = (text: string, most: number): number => Math.min(most, Math.max(0, Math.round(Number.isFinite(numberOf(text)) ? numberOf(text) : 0)));

export function bodyOf(length: string, passes: readonly PassDraft[], zones: RevisionBody['cleanerZones']): RevisionBody {
  return {
    lengthFt: orRefused(numberOf(length)),
    passes: passes.map((p) => ({
      direction: p.direction, fromBoard: boardOf(p.from), toBoard: boardOf(p.to), loads: whole(p.loads, 99), ul: whole(p.ul, 10_000), product: p.product,
      fromFt: orRefused(numberOf(p.fromFt)), toFt: orRefused(numberOf(p.toFt)), ...p.kept,
    })),
    ...(zones ? { cleanerZones: zones } : {}),
  };
}
