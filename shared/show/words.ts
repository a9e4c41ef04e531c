import type { RefusalCode } from '../protocol/messages';

/** Five plain words or fewer for each reason why the hub says no. */
export const refusalWords: Readonly<Record<RefusalCode, string>> = {
  expired: 'Too late, not fired',
  'not-allowed': 'Your role may not',
  'unknown-scene': 'Scene is not in show',
  'unknown-screen': 'Screen is not in venue',
  'unknown-phase': 'Phase is not in show',
  'unknown-display': 'Display is not in show',
  'show-closed': 'Show is closed',
  'bad-command': 'Hub could not read it',
  'too-many': 'Too many at once',
  'shutting-down': 'Hub stops, try again soon',
};

/** What a page says by itself when the hub gave no answer. */
export const notSentWords = {
  noLink: 'No link, not sent',
  /** Sent, but no answer came in time: the wall is the truth. */
  noAnswer: 'No answer, check the wall',
} as const;
