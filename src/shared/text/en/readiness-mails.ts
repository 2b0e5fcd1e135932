import type { Session } from '../../domain/leagues/session.ts';
import type { Because } from '../../domain/readiness/confirmation.ts';
import type { Outstanding } from '../../domain/readiness/session.ts';
import { lanesText } from './formats.ts';
import { becauseSentence } from './readiness.ts';
import { checkSentence, type Clock } from './readiness-checks.ts';

export interface LetterWords {
  subject: string;
  /** Paragraphs. */
  parts: string[];
}

const head = (session: Session, clock: Clock): string => `${session.name}, ${lanesText(session.lanes)}. Warm-up ${clock(session.warmUpAt)}, start ${clock(session.startAt)}.`;

export const heldMail = (minutes: number, session: Session, open: readonly Outstanding[], clock: Clock): LetterWords => ({
  subject: `${session.name} isn’t ready, ${minutes} minutes to warm-up`,
  parts: [
    head(session, clock),
    ...open.filter((group) => group.check.verdict !== 'ok').map((group) => checkSentence(group.lanes, group.check, clock)),
    'The page of the session is live; this letter is a record.',
  ],
});

export const readyMail = (session: Session, clock: Clock): LetterWords => ({
  subject: `${session.name} is ready`,
  parts: [head(session, clock), 'All its lanes are ready now.'],
});

export const reopenedMail = (session: Session, because: Because, clock: Clock): LetterWords => ({
  subject: `${session.name}: your confirmation is open again`,
  parts: [head(session, clock), becauseSentence(because, clock), 'Look at the session again and confirm, or raise a concern. Play doesn’t wait for it.'],
});
