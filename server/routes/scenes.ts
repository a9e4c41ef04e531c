import { Router } from 'express';
import { z } from 'zod';
import { audit } from '#server/services/audit';
import {
  duplicateScene,
  listScenes,
  listSceneVersions,
  makeScene,
  readScene,
  saveScene,
  setRemoved,
} from '#server/services/shows/scenes';
import { findShow } from '#server/services/shows/shows';
import { newSceneSchema, saveSceneSchema } from '#shared/api/shows';
import type { RouteContext } from './context';
import { route } from './route';

const versionSchema = z.coerce.number().int().min(1);

/** Scenes of a show and their versions. */
export const sceneRoutes = ({ db, hub }: RouteContext): Router => {
  const router = Router();
  route(
    router,
    { method: 'get', path: '/api/shows/:id/scenes', action: 'scene.read' },
    async ({ caller, param }) => {
      const show = await findShow(db, caller.crewId, param('id'));
      return listScenes(db, show.id);
    },
  );
  route(
    router,
    {
      method: 'post',
      path: '/api/shows/:id/scenes',
      action: 'scene.edit',
      body: newSceneSchema,
      status: 201,
    },
    async ({ caller, param, body }) => {
      const scene = await makeScene(db, caller, param('id'), body);
      hub.manifestChanged(scene.showId);
      await audit(db, { caller, action: 'scene.edit', object: `${scene.id} made` });
      return scene;
    },
  );
  route(router, { method: 'get', path: '/api/scenes/:id', action: 'scene.read' }, ({ caller, param }) =>
    readScene(db, caller.crewId, param('id')),
  );
  route(
    router,
    { method: 'put', path: '/api/scenes/:id', action: 'scene.edit', body: saveSceneSchema },
    async ({ caller, param, body }) => {
      const scene = await saveScene(db, caller, param('id'), body);
      hub.manifestChanged(scene.showId);
      await audit(db, { caller, action: 'scene.edit', object: `${scene.id} version ${scene.version}` });
      return scene;
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/scenes/:id', action: 'scene.edit' },
    async ({ caller, param }) => {
      const showId = await setRemoved(db, caller.crewId, param('id'), true);
      hub.manifestChanged(showId);
      await audit(db, { caller, action: 'scene.edit', object: `${param('id')} removed` });
    },
  );
  route(
    router,
    { method: 'post', path: '/api/scenes/:id/restore', action: 'scene.edit' },
    async ({ caller, param }) => {
      const showId = await setRemoved(db, caller.crewId, param('id'), false);
      hub.manifestChanged(showId);
      await audit(db, { caller, action: 'scene.edit', object: `${param('id')} restored` });
      return readScene(db, caller.crewId, param('id'));
    },
  );
  route(
    router,
    { method: 'post', path: '/api/scenes/:id/duplicate', action: 'scene.edit', status: 201 },
    async ({ caller, param }) => {
      const scene = await duplicateScene(db, caller, param('id'));
      hub.manifestChanged(scene.showId);
      await audit(db, { caller, action: 'scene.edit', object: `${scene.id} copy of ${param('id')}` });
      return scene;
    },
  );
  route(
    router,
    { method: 'get', path: '/api/scenes/:id/versions', action: 'scene.read' },
    ({ caller, param }) => listSceneVersions(db, caller.crewId, param('id')),
  );
  route(
    router,
    { method: 'get', path: '/api/scenes/:id/versions/:version', action: 'scene.read' },
    ({ caller, param }) => readScene(db, caller.crewId, param('id'), versionSchema.parse(param('version'))),
  );
  return router;
};
