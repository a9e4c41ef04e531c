import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits as base64url, for links and cookies. */
export const newToken = (): string => randomBytes(32).toString('base64url');

/** What is kept of a token: its sha256, hex. Tokens have 256 bits, so no salt or slow hash is wanted. */
export const tokenHash = (token: string): string => createHash('sha256').update(token).digest('hex');

/** Short random id of a row. */
export const newId = (): string => randomBytes(9).toString('base64url');
