import nodemailer from 'nodemailer';

export interface Letter {
  messageId: string;
  from: string;
  to: string;
  subject: string;
  text: string;
  html: string;
}

export interface Postman {
  /** Resolves when the SMTP server has taken the letter; rejects otherwise. */
  send(letter: Letter): Promise<void>;
  close(): void;
}

/** Speaks SMTP to the server of `smtpUrl`. Time limits are short: a letter that failed is tried again later. */
export function createPostman(smtpUrl: string): Postman {
  const transport = nodemailer.createTransport({ url: smtpUrl, connectionTimeout: 5000, greetingTimeout: 5000, socketTimeout: 10_000 });
  return {
    async send({ messageId, ...letter }) {
      await transport.sendMail({ ...letter, messageId });
    },
    close: () => transport.close(),
  };
}
