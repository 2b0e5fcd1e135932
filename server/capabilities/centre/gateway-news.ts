import type { SequenceState } from './sequences.ts';

/** By source of its events. */
export type Sequences = Record<string, SequenceState>;

/** What is known of a gateway besides its events. Times in epoch ms. */
export interface GatewayNews {
  heardAt: number | null;
  startedAt: number | null;
  queued: number | null;
  uptimeS: number | null;
  /** Its clock minus ours; null: never measured. */
  clockErrorMs: number | null;
  /** Events that came a second time with other content, and when the last did. */
  changedRepeats: number;
  changedRepeatAt: number | null;
  sequences: Sequences;
}

export const noNews: GatewayNews = {
  heardAt: null, startedAt: null, queued: null, uptimeS: null, clockErrorMs: null, changedRepeats: 0, changedRepeatAt: null, sequences: {},
};

/** A gateway that said nothing for this long is silent, and its lanes unheard. It says something every 30 s. */
export const SILENT_MS = 90_000;
/** Clock errors up to this are the network's and are left alone. */
export const CLOCK_ERROR_MS = 5_000;
/** How long a repeat with other content stays a fault. */
const REPEAT_SHOWN_MS = 24 * 3_600_000;

export const isSilent = (news: GatewayNews, now: number): boolean => news.heardAt === null || now - news.heardAt > SILENT_MS;
export const clockIsOff = (news: GatewayNews): boolean => news.clockErrorMs !== null && Math.abs(news.clockErrorMs) > CLOCK_ERROR_MS;
export const repeatedOtherwise = (news: GatewayNews, now: number): boolean => news.changedRepeatAt !== null && now - news.changedRepeatAt < REPEAT_SHOWN_MS;
