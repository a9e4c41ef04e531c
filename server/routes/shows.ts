import { Router } from 'express';
import { z } from 'zod';
import { audit } from '#server/services/audit';
import { notFound } from '#server/services/fault';
import { showManifest } from '#server/services/manifest';
import { readAsRun } from '#server/services/shows/asRun';
import {
  cloneShow,
  deleteShow,
  editShow,
  findShow,
  listShows,
  makeShow,
  readShow,
  savePhases,
  setMode,
} from '#server/services/shows/shows';
import { cloneShowSchema, editShowSchema, newShowSchema, phasesSchema } from '#shared/api/shows';
import type { RouteContext } from './context';
import { route } from './route';

const limitSchema = z.coerce.number().int().min(1).max(5000).catch(500);
const afterSchema = z.coerce.number().catch(0);

/** Shows: planning, copying, opening and closing a night, its phases and its as-run log. */
export const showRoutes = (context: RouteContext): Router => {
  const router = Router();
  planRoutes(router, context);
  nightRoutes(router, context);
  return router;
};

function planRoutes(router: Router, { db, hub }: RouteContext): void {
  route(router, { method: 'get', path: '/api/shows', action: 'show.read' }, ({ caller }) =>
    listShows(db, caller.crewId),
  );
  route(
    router,
    { method: 'post', path: '/api/shows', action: 'show.make', body: newShowSchema, status: 201 },
    async ({ caller, body }) => {
      const show = await makeShow(db, caller.crewId, body);
      await audit(db, { caller, action: 'show.make', object: show.id });
      return show;
    },
  );
  route(router, { method: 'get', path: '/api/shows/:id', action: 'show.read' }, ({ caller, param }) =>
    readShow(db, caller.crewId, param('id')),
  );
  route(
    router,
    { method: 'patch', path: '/api/shows/:id', action: 'show.edit', body: editShowSchema },
    async ({ caller, param, body }) => {
      const show = await editShow(db, caller.crewId, param('id'), body);
      hub.manifestChanged(show.id);
      await audit(db, { caller, action: 'show.edit', object: show.id });
      return show;
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/shows/:id', action: 'show.delete' },
    async ({ caller, param }) => {
      const displays = await db.displays.findAll({ where: { showId: param('id') }, attributes: ['id'] });
      await deleteShow(db, caller.crewId, param('id'));
      for (const { id } of displays) hub.revoke({ displayId: id });
      hub.manifestChanged(param('id'));
      await audit(db, { caller, action: 'show.delete', object: param('id') });
    },
  );
  route(
    router,
    { method: 'post', path: '/api/shows/:id/clone', action: 'show.make', body: cloneShowSchema, status: 201 },
    async ({ caller, param, body }) => {
      const show = await cloneShow(db, caller, param('id'), body);
      await audit(db, { caller, action: 'show.make', object: `${show.id} from ${param('id')}` });
      return show;
    },
  );
  route(
    router,
    { method: 'put', path: '/api/shows/:id/phases', action: 'show.edit', body: phasesSchema },
    async ({ caller, param, body }) => {
      const phases = await savePhases(db, caller.crewId, param('id'), body);
      hub.manifestChanged(param('id'));
      await audit(db, { caller, action: 'show.edit', object: `${param('id')} phases` });
      return phases;
    },
  );
}

function nightRoutes(router: Router, { db, hub }: RouteContext): void {
  for (const act of ['open', 'close'] as const)
    route(
      router,
      { method: 'post', path: `/api/shows/:id/${act}`, action: 'show.open' },
      async ({ caller, param }) => {
        const show = await setMode(db, caller.crewId, param('id'), act);
        hub.modeChanged(show.id, show.mode);
        await audit(db, { caller, action: 'show.open', object: `${show.id} ${act}` });
        return show;
      },
    );
  route(
    router,
    { method: 'get', path: '/api/shows/:id/as-run', action: 'asRun.read' },
    ({ caller, param, request }) =>
      readAsRun(
        db,
        caller.crewId,
        param('id'),
        limitSchema.parse(request.query.limit),
        afterSchema.parse(request.query.after),
      ),
  );
  route(
    router,
    { method: 'get', path: '/api/shows/:id/manifest', action: 'show.read' },
    async ({ caller, param }) => {
      await findShow(db, caller.crewId, param('id'));
      const found = await showManifest(db, param('id'));
      if (!found) throw notFound('show');
      return found.manifest;
    },
  );
}
