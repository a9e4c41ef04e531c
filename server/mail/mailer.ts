import type { KeptMail } from '#shared/api/accounts';

export interface Letter {
  to: string;
  subject: string;
  /** Plain text. */
  text: string;
}

/** Sends letters; in development and tests they are kept by a local fake and shown on /mail. */
export interface Mailer {
  send: (letter: Letter) => Promise<void>;
  /** What the fake keeps, newest first; null when letters really leave. */
  kept: () => KeptMail[] | null;
  close: () => Promise<void>;
}
