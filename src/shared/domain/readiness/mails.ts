import type { SessionVerdict } from './session.ts';

const MINUTE = 60_000;

export type MailKind = 'held-60' | 'held-30' | 'ready';

/** What has gone out so far about one session. */
export interface Sent {
  held60: boolean;
  held30: boolean;
  /** It was held at some time since warm-up was an hour away, and people were told. */
  ready: boolean;
}

/**
 * Which mail is due now: at 60 and at 30 minutes before warm-up only when held (the hour's mail is due until the half hour,
 * so that a server that was away still tells), and one when ready is reached after people were told that it was held.
 */
export function mailDue(verdict: SessionVerdict, warmUpAt: number, sent: Sent, now: number): MailKind | null {
  const left = warmUpAt - now;
  if (left <= 0 || left > 60 * MINUTE) return null;
  if (verdict === 'held') {
    if (left > 30 * MINUTE) return sent.held60 ? null : 'held-60';
    return sent.held30 ? null : 'held-30';
  }
  return verdict === 'ready' && (sent.held60 || sent.held30) && !sent.ready ? 'ready' : null;
}
