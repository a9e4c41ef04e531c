import connectPgSimple from 'connect-pg-simple';
import type { Request, RequestHandler } from 'express';
import session from 'express-session';
import type { Database } from '#server/models/database';
import { sessionCookieName } from '#server/services/sessionCookie';

declare module 'express-session' {
  interface SessionData {
    userId: string;
    /** What the browser calls itself, in words. */
    device: string;
    /** ISO time of the sign-in. */
    since: string;
  }
}

const lifeMs = 14 * 24 * 3_600_000;

/** Sessions in PostgreSQL. A visitor who has not signed in gets none. */
export function sessionMiddleware(db: Database, secret: string): RequestHandler {
  const Store = connectPgSimple(session);
  return session({
    name: sessionCookieName,
    secret,
    store: new Store({
      pool: db.pool,
      tableName: 'session',
      pruneSessionInterval: 3600,
      errorLog: () => undefined,
    }),
    resave: false,
    rolling: true,
    saveUninitialized: false,
    cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', maxAge: lifeMs, path: '/' },
  });
}

/** “Firefox on Android”, from what the browser says of itself. */
export function deviceWords(agent: string | undefined): string {
  const text = agent ?? '';
  const browsers: [RegExp, string][] = [
    [/Edg\//, 'Edge'],
    [/Firefox\//, 'Firefox'],
    [/Chrom(e|ium)\//, 'Chrome'],
    [/Safari\//, 'Safari'],
  ];
  const systems: [RegExp, string][] = [
    [/Android/, 'Android'],
    [/iPhone|iPad/, 'iOS'],
    [/Mac OS/, 'macOS'],
    [/Windows/, 'Windows'],
    [/Linux/, 'Linux'],
  ];
  const first = (list: [RegExp, string][], none: string) => list.find(([one]) => one.test(text))?.[1] ?? none;
  return `${first(browsers, 'A browser')} on ${first(systems, 'an unknown system')}`;
}

/** Starts a fresh session for a user: a name that was known before the sign-in is worth nothing (CWE-384). */
export function beginSession(request: Request, userId: string): Promise<void> {
  return new Promise((resolve, reject) => {
    request.session.regenerate((error: unknown) => {
      if (error) return reject(error);
      request.session.userId = userId;
      request.session.device = deviceWords(request.get('user-agent'));
      request.session.since = new Date().toISOString();
      request.session.save((saved: unknown) => (saved ? reject(saved) : resolve()));
    });
  });
}

/** Ends the session of a request. */
export function leaveSession(request: Request): Promise<void> {
  return new Promise((resolve, reject) => {
    request.session.destroy((error: unknown) => (error ? reject(error) : resolve()));
  });
}
