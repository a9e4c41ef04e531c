import type { RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { Fault } from '#server/services/fault';

interface Limit {
  /** ms */
  windowMs: number;
  most: number;
  /** Field of the body that is limited beside the address. */
  by?: string;
  /** Count refusals only. */
  failures?: boolean;
}

const minutes = (ms: number): string => `${Math.round(ms / 60_000)} minutes`;

/** A limit on guesses: by address, and by a field such as the mail. */
export const guesses = ({ windowMs, most, by, failures = false }: Limit): RequestHandler =>
  rateLimit({
    windowMs,
    limit: most,
    skipSuccessfulRequests: failures,
    legacyHeaders: false,
    keyGenerator: (request) => {
      const field = by
        ? String((request.body as Record<string, unknown> | undefined)?.[by] ?? '').slice(0, 300)
        : '';
      return `${ipKeyGenerator(request.ip ?? '')} ${field.trim().toLowerCase()}`;
    },
    handler: () => {
      throw new Fault(429, 'Too many tries.', `Wait ${minutes(windowMs)} and try again.`);
    },
  });
