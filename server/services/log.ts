import pino from 'pino';

/** What parts of the server write their log with. */
export type Log = Pick<pino.Logger, 'info' | 'warn' | 'error' | 'debug'>;

/** A log on standard error, so that standard output stays for the addresses that people read. */
export const makeLog = (level: string): Log => pino({ level, base: undefined }, pino.destination(2));
