import { Router } from 'express';
import { rateLimit } from 'express-rate-limit';
import { audit } from '#server/services/audit';
import {
  findDisplay,
  forgetDisplay,
  listDisplays,
  listMaps,
  readDisplay,
  renameDisplay,
  saveMap,
} from '#server/services/displays/displays';
import { askPairing, joinDisplay, lookUpPairing, waitPairing } from '#server/services/displays/pairing';
import { Fault } from '#server/services/fault';
import {
  askPairingSchema,
  editDisplaySchema,
  joinDisplaySchema,
  lookUpPairingSchema,
  saveMapSchema,
  waitPairingSchema,
} from '#shared/api/displays';
import type { RouteContext } from './context';
import { displayCookie } from './displayCookie';
import { route } from './route';

/** Wrong codes one person may try in ten minutes: a guess hits one of 64 waiting codes with odds of 1 in 1000. */
const codeTries = 10;

/** Displays of a show: joining, names, maps. */
export const displayRoutes = (context: RouteContext): Router => {
  const router = Router();
  pairingRoutes(router, context);
  joinedRoutes(router, context);
  mapRoutes(router, context);
  return router;
};

function pairingRoutes(router: Router, { db, hub }: RouteContext): void {
  const tries = rateLimit({
    windowMs: 10 * 60_000,
    limit: codeTries,
    skipSuccessfulRequests: true,
    keyGenerator: (_request, response) => String(response.locals.who?.caller?.userId ?? 'anyone'),
    legacyHeaders: false,
    handler: () => {
      throw new Fault(
        429,
        'Too many wrong codes.',
        'Wait ten minutes, then read the code off the display again.',
      );
    },
  });
  router.use(['/api/displays/look-up', '/api/displays/join'], tries);

  route(
    router,
    { method: 'post', path: '/api/pairing', action: 'pairing.ask', body: askPairingSchema, status: 201 },
    ({ body, request }) =>
      askPairing(db, {
        raster: body.raster,
        address: request.ip ?? 'unknown',
        browser: request.get('user-agent') ?? '',
      }),
  );

  route(
    router,
    { method: 'post', path: '/api/pairing/wait', action: 'pairing.wait', body: waitPairingSchema },
    async ({ body, request, response }) => {
      const waited = await waitPairing(db, body.deviceSecret);
      if (waited.state === 'joined')
        response.setHeader('set-cookie', displayCookie(waited.token, request.secure));
      return { state: waited.state, displayId: waited.displayId };
    },
  );

  route(
    router,
    { method: 'post', path: '/api/displays/look-up', action: 'display.join', body: lookUpPairingSchema },
    async ({ body }) => {
      const { code, raster, address, browser } = await lookUpPairing(db, body.code);
      return { code, raster, address, browser };
    },
  );

  route(
    router,
    {
      method: 'post',
      path: '/api/displays/join',
      action: 'display.join',
      body: joinDisplaySchema,
      status: 201,
    },
    async ({ body, caller }) => {
      const id = await joinDisplay(db, caller, body);
      await audit(db, { caller, action: 'display.join', object: id });
      hub.displaysChanged(body.showId);
      return readDisplay(db, caller.crewId, id);
    },
  );
}

function joinedRoutes(router: Router, { db, hub }: RouteContext): void {
  route(router, { method: 'get', path: '/api/display/self', action: 'display.self' }, async ({ who }) => {
    if (!who.display) throw new Fault(401, 'This display is not joined.', 'Join it on Outputs.');
    const { displayId, showId, crewId } = who.display;
    const { name } = await findDisplay(db, crewId, displayId);
    return { displayId, showId, name };
  });

  route(
    router,
    { method: 'get', path: '/api/shows/:id/displays', action: 'display.read' },
    ({ caller, param }) => listDisplays(db, caller.crewId, param('id')),
  );

  route(router, { method: 'get', path: '/api/displays/:id', action: 'display.read' }, ({ caller, param }) =>
    readDisplay(db, caller.crewId, param('id')),
  );

  route(
    router,
    { method: 'patch', path: '/api/displays/:id', action: 'display.edit', body: editDisplaySchema },
    async ({ caller, param, body }) => {
      const display = await renameDisplay(db, caller.crewId, param('id'), body.name);
      hub.displaysChanged(display.showId);
      return display;
    },
  );

  route(
    router,
    { method: 'delete', path: '/api/displays/:id', action: 'display.forget' },
    async ({ caller, param }) => {
      const showId = await forgetDisplay(db, caller.crewId, param('id'));
      await audit(db, { caller, action: 'display.forget', object: param('id') });
      hub.revoke({ displayId: param('id') });
      hub.displaysChanged(showId);
    },
  );
}

function mapRoutes(router: Router, { db, hub }: RouteContext): void {
  route(router, { method: 'get', path: '/api/displays/:id/maps', action: 'map.read' }, ({ caller, param }) =>
    listMaps(db, caller.crewId, param('id')),
  );

  route(
    router,
    { method: 'post', path: '/api/displays/:id/maps', action: 'map.save', body: saveMapSchema, status: 201 },
    async ({ caller, param, body }) => {
      const { showId, saved } = await saveMap(db, caller, param('id'), body);
      await audit(db, { caller, action: 'map.save', object: `${param('id')}/${saved.version}` });
      hub.mapSaved(showId, param('id'), saved.version, saved.map, caller.userId);
      return saved;
    },
  );
}
