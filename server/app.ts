import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express, { type Express, type RequestHandler, type Router } from 'express';
import helmet from 'helmet';
import type { Database } from '#server/models/database';
import { problems } from '#server/routes/problem';
import type { Who } from '#server/routes/route';
import { displayByToken } from '#server/services/displays/displays';
import { tokenInCookie } from '#server/services/displays/tokenInCookie';
import { Fault } from '#server/services/fault';
import type { Log } from '#server/services/log';
import { sessionCaller } from '#server/services/sessions';
import { type HostRule, originAllowed } from './origins';

export interface AppParts {
  db: Database;
  log: Log;
  /** Puts `request.session` in place. */
  sessions: RequestHandler;
  routers: Router[];
  hosts: HostRule;
  /** Built pages; null serves none (tests of routes). */
  pagesFolder: string | null;
  /** A proxy on this machine stands before us: then, and only then, what it says of client and https is believed. */
  behindProxy?: boolean;
}

/** The server's HTTP side: guards, then who asks, then routes, then pages, then problems. */
export function makeApp(parts: AppParts): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', parts.behindProxy ? 'loopback' : false);
  app.use(securityHeaders(parts.hosts));
  app.use(hostGuard(parts.hosts));
  app.get('/healthz', (_request, response) => {
    response.setHeader('cache-control', 'no-store');
    response.json({ name: 'lampyrid', up: true });
  });
  app.use(['/api', '/media'], noStore, writeGuard(parts.hosts), express.json({ limit: '1mb' }));
  app.use(['/api', '/media'], parts.sessions, identify(parts.db));
  for (const router of parts.routers) app.use(router);
  app.use(['/api', '/media'], (request) => {
    throw new Fault(
      404,
      `There is nothing at ${request.method} ${request.originalUrl.split('?')[0]}.`,
      'Reload the page: it may be older than the server.',
    );
  });
  if (parts.pagesFolder) servePages(app, parts.pagesFolder);
  app.use(problems(parts.log));
  return app;
}

/** Headers after OWASP's list; the policy lets Pixi run (no eval: it is built with its shim) and nothing foreign load. */
const securityHeaders = (hosts: HostRule): RequestHandler =>
  helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'"],
        'style-src': ["'self'", "'unsafe-inline'"],
        'img-src': ["'self'", 'blob:', 'data:'],
        'media-src': ["'self'", 'blob:'],
        'font-src': ["'self'"],
        'worker-src': ["'self'", 'blob:'],
        'connect-src': ["'self'", 'blob:', 'data:', ...hosts.socketOrigins()],
        'object-src': ["'none'"],
        'base-uri': ["'none'"],
        'form-action': ["'self'"],
        'frame-ancestors': ["'none'"],
      },
    },
    referrerPolicy: { policy: 'no-referrer' },
    // Only over https may a browser be told to stay there; on a venue's plain network it would lock people out.
    strictTransportSecurity: false,
  });

/** A name that is not ours is an attack by DNS rebinding (CWE-350), or a wrong address. */
const hostGuard =
  (hosts: HostRule): RequestHandler =>
  (request, _response, next) => {
    if (hosts.knows(request.headers.host)) return next();
    throw new Fault(
      421,
      'Lampyrid does not go by that name.',
      'Open it by the address that the start command printed.',
    );
  };

const noStore: RequestHandler = (_request, response, next) => {
  response.setHeader('cache-control', 'no-store');
  next();
};

const reading = new Set(['GET', 'HEAD', 'OPTIONS']);

/** What changes something comes from our own pages, as JSON or as an upload with its own header (CWE-352). */
const writeGuard =
  (hosts: HostRule): RequestHandler =>
  (request, _response, next) => {
    if (reading.has(request.method)) return next();
    if (!originAllowed(hosts, request.headers.origin))
      throw new Fault(
        403,
        'This request did not come from a page of ours.',
        'Open Lampyrid itself and try there.',
      );
    const json = (request.headers['content-type'] ?? '').toLowerCase().startsWith('application/json');
    const empty = request.headers['content-length'] === '0' || request.headers['content-type'] === undefined;
    if (json || empty || request.headers['x-file-name'] !== undefined) return next();
    throw new Fault(415, 'Only JSON is taken here.', 'Send content-type application/json.');
  };

/** Looks up who asks, anew each time, so that a role that was taken away is gone at once. */
const identify =
  (db: Database): RequestHandler =>
  async (request, response, next) => {
    const token = tokenInCookie(request.headers.cookie);
    const who: Who = {
      caller: await sessionCaller(db, request.session),
      display: token ? await displayByToken(db, token) : null,
    };
    response.locals.who = who;
    next();
  };

const immutable = 'public, max-age=31536000, immutable';

/** Sends the gzipped copy of a script or style to browsers that take it; anything else goes on. */
const squeezed =
  (folder: string): RequestHandler =>
  (request, response, next) => {
    const name = String(request.params.name ?? '');
    const takes = /^[\w.-]+\.(js|css)$/.test(name) && request.acceptsEncodings('gzip') === 'gzip';
    if (!takes || !existsSync(join(folder, `${name}.gz`))) return next();
    response.setHeader('content-encoding', 'gzip');
    response.setHeader('vary', 'accept-encoding');
    response.setHeader('cache-control', immutable);
    response.type(name.endsWith('.js') ? 'text/javascript' : 'text/css');
    response.sendFile(`${name}.gz`, { root: folder });
  };

/** Built pages: named after their content below /assets, so kept for good; the pages themselves never. */
function servePages(app: Express, folder: string): void {
  app.get('/assets/:name', squeezed(join(folder, 'assets')));
  app.use(
    '/assets',
    express.static(join(folder, 'assets'), {
      index: false,
      setHeaders: (response) => response.setHeader('cache-control', immutable),
    }),
  );
  app.use(
    express.static(folder, {
      index: false,
      extensions: [],
      setHeaders: (response) => response.setHeader('cache-control', 'no-cache'),
    }),
  );
  const page =
    (name: string): RequestHandler =>
    (_request, response, next) => {
      const file = join(folder, name);
      if (!existsSync(file))
        return next(new Fault(503, 'The pages are not built.', 'Run npm start: it builds them.'));
      response.setHeader('cache-control', 'no-cache');
      response.sendFile(file);
    };
  app.get(['/display', '/display/'], page('display.html'));
  app.get('/*path', (request, response, next) =>
    // A missing script must be a 404, not a page: a stale tab would try to run it.
    request.path.startsWith('/assets/') || /\.[a-z0-9]+$/i.test(request.path)
      ? next(new Fault(404, 'There is no such file.', 'Reload the page.'))
      : page('index.html')(request, response, next),
  );
  app.get('/', page('index.html'));
}
