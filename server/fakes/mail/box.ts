/** One caught mail, as the page and its JSON show it. */
export type CaughtMail = {
  /** Counts from 1 in order of arrival. */
  number: number;
  /** Epoch ms at which the catcher had all of it. */
  at: number;
  messageId: string | null;
  from: string;
  /** Recipients of the envelope: who it would have gone to. */
  to: string[];
  subject: string;
  text: string;
  html: string | null;
};

/** The oldest are dropped beyond this many. */
const AT_MOST = 500;

/** Keeps caught mails in memory, newest first. */
export function createBox() {
  const mails: CaughtMail[] = [];
  let count = 0;
  return {
    add(mail: Omit<CaughtMail, 'number'>): void {
      count += 1;
      mails.unshift({ number: count, ...mail });
      mails.length = Math.min(mails.length, AT_MOST);
    },
    all: (): readonly CaughtMail[] => mails,
    find: (number: number): CaughtMail | undefined => mails.find((mail) => mail.number === number),
  };
}

export type Box = ReturnType<typeof createBox>;
